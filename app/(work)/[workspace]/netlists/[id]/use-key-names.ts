"use client";

import { useSyncExternalStore } from "react";
import { isApple } from "@/app/_components/editor/keyboard";

const never = () => () => {};

interface KeyNames {
  readonly queue: string;
  readonly tab: string;
}

const USUAL: KeyNames = { queue: "Ctrl ↵", tab: "Ctrl M" };
const APPLE: KeyNames = { queue: "⌘ ↵", tab: "Ctrl Shift M" };

/** Keys by the names that stand on the reader's keyboard; the server does not know it and writes the usual ones. */
export function useKeyNames(): KeyNames {
  return useSyncExternalStore(
    never,
    () => (isApple() ? APPLE : USUAL),
    () => USUAL,
  );
}
