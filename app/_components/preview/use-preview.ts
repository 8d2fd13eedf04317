"use client";

import { useEffect, useState, useSyncExternalStore } from "react";
import { type Preview, Previewing, type SolvingThread } from "./previewing";

function openThread(): SolvingThread {
  const thread: unknown = new Worker(new URL("./preview.worker.ts", import.meta.url), { type: "module" });
  return thread as SolvingThread;
}

/**
 * The preview of a sheet that begins with `text`; later texts are told to it as they are typed. Nothing is solved, and no thread
 * started, before `isSeen`.
 */
export function usePreviewing(text: string, isSeen = true): Previewing {
  const [previewing] = useState(
    () =>
      new Previewing(
        openThread,
        () => performance.now(),
        (then) => requestAnimationFrame(then),
      ),
  );
  // biome-ignore lint/correctness/useExhaustiveDependencies: begins once, with the text the visit began with
  useEffect(() => {
    if (!isSeen) return;
    previewing.setText(text);
    return () => previewing.close();
  }, [previewing, isSeen]);
  return previewing;
}

/** A part of the preview, which must be one of its own values, so that what does not change is not drawn again. */
export function usePreview<T>(previewing: Previewing, part: (preview: Preview) => T): T {
  const read = () => part(previewing.present());
  return useSyncExternalStore(previewing.subscribe, read, read);
}
