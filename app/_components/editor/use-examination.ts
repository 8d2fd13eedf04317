"use client";

import { useCallback, useEffect, useRef, useState } from "react";
import { Checking, type CheckThread } from "./checking";
import type { Examination, PlanSummary } from "./examine";

export interface Examined extends Examination {
  /** The text that was examined: the spans of the diagnostics are of this one. */
  readonly text: string;
  /** The plan of the latest text that had one: what stands on the page while a line is half written. */
  readonly latestPlan: PlanSummary | null;
}

/**
 * What the checker says of `text`, worked out in a thread of the browser. Until the first answer, and for a moment after each
 * change, the answer is of an earlier text: compare `text`. A text that is on its way to be `text` can be asked about before,
 * with `ask`; `newest` has what is said of it. `broken` when the browser could not start the thread.
 */
export function useExamination(text: string): {
  readonly examined: Examined | null;
  readonly newest: Examined | null;
  readonly broken: boolean;
  readonly ask: (text: string) => void;
} {
  const [newest, setNewest] = useState<Examined | null>(null);
  const [examined, setExamined] = useState<Examined | null>(null);
  const [broken, setBroken] = useState(false);
  const checking = useRef<Checking | null>(null);

  useEffect(() => {
    const thread = new Worker(new URL("./text.worker.ts", import.meta.url), { type: "module" });
    thread.onerror = () => setBroken(true);
    checking.current = new Checking(thread as CheckThread, (examination, of) => {
      setBroken(false);
      setNewest((before) => ({
        ...examination,
        text: of,
        latestPlan: examination.plan ?? before?.latestPlan ?? null,
      }));
    });
    return () => {
      checking.current = null;
      thread.terminate();
    };
  }, []);

  // Declared after the effect that starts the thread, so the first text is asked about too.
  useEffect(() => checking.current?.ask(text), [text]);

  if (newest !== examined && newest?.text === text) setExamined(newest);
  const ask = useCallback((next: string) => checking.current?.ask(next), []);
  return { examined, newest, broken, ask };
}
