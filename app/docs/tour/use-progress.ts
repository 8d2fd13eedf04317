"use client";

import { useCallback, useEffect, useState } from "react";
import { BEGINNING, keepProgress, keptProgress, type Progress } from "./progress";

/** How far the tour is. The server knows nothing of it, so it stands at the beginning until the page has come. */
export function useProgress(): readonly [
  progress: Progress,
  change: (next: (before: Progress) => Progress) => void,
] {
  const [progress, setProgress] = useState(BEGINNING);
  useEffect(() => setProgress(keptProgress()), []);
  const change = useCallback((next: (before: Progress) => Progress) => {
    setProgress((before) => {
      const after = next(before);
      keepProgress(after);
      return after;
    });
  }, []);
  return [progress, change];
}
