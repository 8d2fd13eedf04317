"use client";

import { useSyncExternalStore } from "react";
import { isApple } from "@/app/_components/editor/keyboard";

const never = () => () => {};
const usual = (keys: string) => keys;
const apple = (keys: string) =>
  // There, Ctrl M ends a line and ⌘ M puts the window away; the editor takes another for the Tab key.
  keys === "Ctrl M" ? "Ctrl Shift M" : keys.replace("Ctrl", "⌘").replace("Alt", "⌥");

/** Gives keys the names that stand on the reader's keyboard; the server does not know it and writes the usual ones. */
export function useShownKeys(): (keys: string) => string {
  return useSyncExternalStore(
    never,
    () => (isApple() ? apple : usual),
    () => usual,
  );
}
