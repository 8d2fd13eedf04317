"use client";

import { useCallback, useEffect, useRef, useState } from "react";
import type { Ruler } from "./axes";
import type { CurveSet } from "./curve-set";
import type { Range } from "./range";
import { panned, stretched, valuesOf } from "./view-range";

/** Ms after the last step of a movement until it counts as one, to be gone back over and to stand in the address. */
const REST = 250;
/** Views that can be gone back over. */
const KEPT = 50;

/** What brings another part of the sweep into view. */
export interface Zoom {
  /** Values of the knob; null for the whole sweep. */
  readonly show: (zoom: Range | null) => void;
  /** By a share of the view; a movement of many steps is one to go back over. */
  readonly pan: (share: number) => void;
  /** To a view `factor` times as wide, about a place on the ruler. */
  readonly stretch: (factor: number, about?: number) => void;
  readonly back: () => void;
  readonly canGoBack: boolean;
}

/**
 * The part of the sweep in view. What was settled is the page's; a movement under way is kept here, so that only the plot is drawn
 * anew while it lasts. `rulerFor` gives the ruler of a zoom.
 */
export function useZoom(
  set: CurveSet,
  settled: Range | null,
  rulerFor: (zoom: Range | null) => Ruler,
  onZoom: (zoom: Range | null) => void,
): { readonly zoom: Range | null; readonly act: Zoom } {
  const [moving, setMoving] = useState<{ zoom: Range | null } | null>(null);
  const [past, setPast] = useState<readonly (Range | null)[]>([]);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const now = useRef({ set, settled, moving, rulerFor, onZoom });
  now.current = { set, settled, moving, rulerFor, onZoom };

  const settle = useCallback((next: Range | null) => {
    clearTimeout(timer.current);
    const before = now.current.settled;
    now.current.moving = null;
    setMoving(null);
    if (before?.from === next?.from && before?.to === next?.to) return;
    setPast((all) => [...all.slice(1 - KEPT), before]);
    now.current.onZoom(next);
  }, []);
  const move = useCallback(
    (change: (ruler: Ruler) => Range) => {
      const { moving: under, settled: before } = now.current;
      const ruler = now.current.rulerFor(under === null ? before : under.zoom);
      const zoom = valuesOf(now.current.set, ruler, change(ruler));
      now.current.moving = { zoom };
      setMoving({ zoom });
      clearTimeout(timer.current);
      timer.current = setTimeout(() => settle(zoom), REST);
    },
    [settle],
  );
  useEffect(() => () => clearTimeout(timer.current), []);

  const pan = useCallback((share: number) => move((ruler) => panned(ruler, share)), [move]);
  const stretch = useCallback(
    (factor: number, about?: number) => move((ruler) => stretched(ruler, factor, about)),
    [move],
  );
  const back = useCallback(() => {
    const before = past.at(-1);
    if (before === undefined) return;
    clearTimeout(timer.current);
    now.current.moving = null;
    setMoving(null);
    setPast(past.slice(0, -1));
    now.current.onZoom(before);
  }, [past]);
  return {
    zoom: moving === null ? settled : moving.zoom,
    act: { show: settle, pan, stretch, back, canGoBack: past.length > 0 },
  };
}
