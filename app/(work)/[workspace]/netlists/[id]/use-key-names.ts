"use client";

import { useSyncExternalStore } from "react";

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
    () => (/Mac|iPhone|iPad/.test(navigator.platform) ? APPLE : USUAL),
    () => USUAL,
  );
}
