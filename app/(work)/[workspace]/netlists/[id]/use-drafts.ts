"use client";

import { useCallback, useEffect, useRef, useState } from "react";
import { type Draft, Drafts } from "./drafts";
import type { Saved } from "./saved";

/**
 * Keeps the unsaved text on this machine while it differs from the saved one. `aside` is the newest text that was set aside, for
 * the reader to take back or drop. `unsafe` when the browser keeps nothing, so that a crash would lose the text.
 */
export function useDrafts(netlistId: string, text: string, saved: Saved, writing: boolean) {
  const drafts = useRef<Drafts | null>(null);
  const [aside, show] = useState<Draft | null>(null);
  const [unsafe, setUnsafe] = useState(false);
  const begun = saved.text;

  // biome-ignore lint/correctness/useExhaustiveDependencies: begins once a visit, with the text the visit began with
  useEffect(() => {
    if (!writing) return;
    drafts.current = new Drafts(window.localStorage, netlistId);
    show(drafts.current.begin(begun));
  }, []);

  useEffect(() => {
    if (drafts.current === null) return;
    if (text === saved.text) drafts.current.clear();
    else setUnsafe(!drafts.current.keep(text, saved.revision, new Date()));
  }, [text, saved]);

  const setAside = useCallback((old: string, base: number) => {
    show(drafts.current?.setAside(old, base, new Date()) ?? null);
  }, []);
  const dropAside = useCallback(() => show(drafts.current?.dropAside() ?? null), []);
  const forget = useCallback(() => drafts.current?.clear(), []);

  return { aside, unsafe, setAside, dropAside, forget };
}
