"use client";

import { useMemo, useSyncExternalStore } from "react";

const TRACES = ["--trace-1", "--trace-2", "--trace-3", "--trace-4", "--trace-5", "--trace-6"] as const;
const TOKENS = [
  ...TRACES,
  "--grid",
  "--rule",
  "--edge",
  "--paper",
  "--surface",
  "--ink",
  "--quiet",
  "--holds",
  "--broken",
] as const;

export type TraceToken = (typeof TRACES)[number];
export type ColourToken = (typeof TOKENS)[number];
export type Colours = Readonly<Record<ColourToken, string>>;

function subscribe(changed: () => void): () => void {
  const system = window.matchMedia("(prefers-color-scheme: dark)");
  const chosen = new MutationObserver(changed);
  system.addEventListener("change", changed);
  chosen.observe(document.documentElement, { attributeFilter: ["data-theme"] });
  return () => {
    system.removeEventListener("change", changed);
    chosen.disconnect();
  };
}

function read(): string {
  const style = getComputedStyle(document.documentElement);
  return TOKENS.map((token) => style.getPropertyValue(token).trim()).join("|");
}

/** The tokens of the look as a canvas needs them, anew when the theme changes; null on the server. */
export function useColours(): Colours | null {
  const joined = useSyncExternalStore(subscribe, read, () => "");
  return useMemo(() => {
    if (joined === "") return null;
    const values = joined.split("|");
    return Object.fromEntries(TOKENS.map((token, i) => [token, values[i]])) as unknown as Colours;
  }, [joined]);
}
