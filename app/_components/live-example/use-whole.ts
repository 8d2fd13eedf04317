"use client";

import { useCallback, useEffect, useRef, useState } from "react";
import type { WholeAnswer } from "./whole-plan";

/** How far the solving of a whole plan is, and the text that it is of. */
export type Whole =
  | { readonly kind: "not yet" }
  | { readonly kind: "missing" }
  | (WholeAnswer & { readonly text: string });

/** Solves the whole plan of a text in a thread of its own, when it is asked to. */
export function useWhole(): {
  readonly whole: Whole;
  readonly start: (text: string) => void;
  readonly stop: () => void;
} {
  const [whole, setWhole] = useState<Whole>({ kind: "not yet" });
  const thread = useRef<Worker | null>(null);
  const end = useCallback(() => {
    thread.current?.terminate();
    thread.current = null;
  }, []);
  useEffect(() => end, [end]);

  const start = useCallback(
    (text: string) => {
      end();
      setWhole({ kind: "progress", text, done: 0, points: 0 });
      const worker = new Worker(new URL("./whole.worker.ts", import.meta.url), { type: "module" });
      thread.current = worker;
      worker.onmessage = ({ data }: MessageEvent<WholeAnswer>) => {
        setWhole({ ...data, text });
        if (data.kind !== "progress") end();
      };
      worker.onerror = () => {
        setWhole({ kind: "missing" });
        end();
      };
      worker.postMessage(text);
    },
    [end],
  );
  const stop = useCallback(() => {
    end();
    setWhole({ kind: "not yet" });
  }, [end]);
  return { whole, start, stop };
}
