"use client";

import { useDeeds } from "@/app/_components/palette/deed-registry";
import type { Deed } from "@/app/_components/palette/deeds";
import type { CurveSet } from "./curve-set";
import { type CurveView, choiceOf } from "./curve-view";

/** Traces that are offered to be hidden one by one; more would bury what else there is. */
const MOST = 12;

/** What a plot offers under "Find or do…": its traces to hide and to draw, and the whole of the sweep. */
export function useCurveDeeds(
  set: CurveSet,
  view: CurveView,
  onView: (change: Partial<CurveView>) => void,
): void {
  const { traces } = choiceOf(set, view);
  const names = set.traces.map(({ name }) => name);
  const all: Deed = {
    id: "all traces",
    words: "Draw all traces",
    also: "show hidden",
    does: () => onView({ traces: null, only: null }),
  };
  const whole: Deed = {
    id: "whole sweep",
    words: "Whole sweep",
    also: "zoom out all",
    keys: "0",
    does: () => onView({ zoom: null }),
  };
  const one = (name: string): Deed => {
    const isShown = traces.includes(name);
    const next = names.filter((other) => (other === name ? !isShown : traces.includes(other)));
    return {
      id: `trace ${name}`,
      words: `${isShown ? "Hide" : "Draw"} trace ${name}`,
      also: "curve line show",
      does: () => onView({ only: null, traces: next }),
    };
  };
  useDeeds(
    "here",
    [
      ...(view.zoom === null ? [] : [whole]),
      ...(names.length > 1 && names.length <= MOST ? names.map(one) : []),
      ...(names.some((name) => !traces.includes(name)) || view.only != null ? [all] : []),
    ],
    1,
  );
}
