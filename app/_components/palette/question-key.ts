"use client";

import { useSyncExternalStore } from "react";

/** Where the reader's wish is kept; anything but "off" is on. */
const PLACE = "keys-by-question-mark";
const CHANGED = "question-key";

/**
 * Whether a question mark alone opens the list of keys. Who dictates text sets off such keys by speaking, so they can be switched
 * off (WCAG 2.2, 2.1.4).
 */
export function isQuestionKeyOn(): boolean {
  try {
    return localStorage.getItem(PLACE) !== "off";
  } catch {
    return true;
  }
}

export function keepQuestionKey(isOn: boolean): void {
  try {
    localStorage.setItem(PLACE, isOn ? "on" : "off");
  } catch {
    // Where the browser keeps nothing, the usual stays.
  }
  window.dispatchEvent(new Event(CHANGED));
}

export function useQuestionKey(): boolean {
  return useSyncExternalStore(listen, isQuestionKeyOn, () => true);
}

function listen(changed: () => void): () => void {
  window.addEventListener(CHANGED, changed);
  window.addEventListener("storage", changed);
  return () => {
    window.removeEventListener(CHANGED, changed);
    window.removeEventListener("storage", changed);
  };
}
