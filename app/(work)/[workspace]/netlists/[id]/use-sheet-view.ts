"use client";

import { useCallback, useEffect, useRef, useState } from "react";
import type { CurveView } from "@/app/_components/curves/curve-view";
import type { Previewing } from "@/app/_components/preview/previewing";
import { usePreview } from "@/app/_components/preview/use-preview";
import { useAddress } from "@/app/_components/ui/use-address";
import { readSheetAddress, type SheetAddress, writeSheetAddress } from "./sheet-address";

/** Ms that a knob rests before the address follows it: browsers stop a page that rewrites its address at each step. */
const REST = 400;

/** What the sheet is looked at with, beginning with what its address says. */
export function useSheetView(search: string) {
  const [{ side, view, turned }, setState] = useState(() => readSheetAddress(new URLSearchParams(search)));
  const onView = useCallback(
    (change: Partial<CurveView>) =>
      setState((before) => ({ ...before, view: { ...before.view, ...change } })),
    [],
  );
  const onSide = useCallback(
    (next: string) =>
      setState((before) => ({ ...before, side: next === "connections" ? "connections" : "preview" })),
    [],
  );
  return { side, view, asked: turned, onView, onSide };
}

interface Kept extends Pick<SheetAddress, "side" | "view"> {
  /** What the knobs were turned to in the address that was asked for. */
  readonly asked: ReadonlyMap<string, number>;
  readonly previewing: Previewing;
}

/** Keeps the address of the sheet, and turns the knobs as it says once the text is known to have them. Draws nothing. */
export function KeepSheetAddress({ side, view, asked, previewing }: Kept) {
  const outline = usePreview(previewing, (preview) => preview.outline);
  const turned = useRested(
    usePreview(previewing, (preview) => preview.turned),
    asked,
  );
  const isTurned = useRef(asked.size === 0);
  useEffect(() => {
    if (isTurned.current || outline === null) return;
    isTurned.current = true;
    for (const { name } of outline.knobs) {
      const value = asked.get(name);
      if (value !== undefined) previewing.turn(name, value);
    }
  }, [outline, asked, previewing]);
  useAddress(writeSheetAddress({ side, view, turned }));
  return null;
}

/** `now` when it has rested; `first` before it changed for the first time. */
function useRested<T>(now: T, first: T): T {
  const [rested, setRested] = useState(first);
  const before = useRef(now);
  useEffect(() => {
    if (before.current === now) return;
    const timer = setTimeout(() => {
      before.current = now;
      setRested(now);
    }, REST);
    return () => clearTimeout(timer);
  }, [now]);
  return rested;
}
