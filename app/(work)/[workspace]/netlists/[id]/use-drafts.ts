"use client";

import { useCallback, useEffect, useRef, useState } from "react";
import { browserStore, enterTab, livingTabs } from "./draft-store";
import { type Draft, Drafts } from "./drafts";
import type { Saved } from "./saved";

interface Asked {
  readonly netlistId: string;
  /** Who writes: others of the same browser have drafts of their own. */
  readonly writer: string;
  readonly text: string;
  readonly saved: Saved;
  readonly mayWrite: boolean;
}

/**
 * Keeps the unsaved text on this machine while it differs from the saved one. `aside` is the newest text that was set aside, for
 * the reader to take back or drop. `unsafe` when the browser keeps nothing, so that a crash would lose the text.
 */
export function useDrafts({ netlistId, writer, text, saved, mayWrite }: Asked) {
  const drafts = useRef<Drafts | null>(null);
  const latest = useRef(saved);
  const [aside, show] = useState<Draft | null>(null);
  const [unsafe, setUnsafe] = useState(false);
  const begun = saved.text;

  // biome-ignore lint/correctness/useExhaustiveDependencies: begins once a visit, with the text the visit began with
  useEffect(() => {
    if (!mayWrite) return;
    const { tab, leave } = enterTab();
    const own = new Drafts(browserStore(), { netlist: netlistId, writer, tab }, (isKept) =>
      setUnsafe(!isKept),
    );
    drafts.current = own;
    livingTabs()
      .then((living) => own.begin(begun, living))
      .then(show, () => setUnsafe(true));
    return () => {
      drafts.current = null;
      // The last words are in the store before another tab may take them for left behind.
      void own.settled().then(leave);
    };
  }, []);

  useEffect(() => {
    latest.current = saved;
    if (drafts.current === null) return;
    if (text === saved.text) drafts.current.clear();
    else drafts.current.keep(text, saved.revision, new Date());
  }, [text, saved]);

  /** To be called at each key stroke, with the text as it stands. */
  const typed = useCallback((now: string) => {
    const { text: kept, revision } = latest.current;
    if (now !== kept) drafts.current?.keep(now, revision, new Date());
  }, []);
  const setAside = useCallback((old: string, base: number, at = new Date()) => {
    show(drafts.current?.setAside(old, base, at) ?? null);
  }, []);
  const dropAside = useCallback(() => show(drafts.current?.dropAside() ?? null), []);
  const forget = useCallback(() => drafts.current?.clear(), []);

  return { aside, unsafe, typed, setAside, dropAside, forget };
}
