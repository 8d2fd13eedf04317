"use client";

import type { CurveSet } from "@/app/_components/curves/curve-set";
import { choiceOf } from "@/app/_components/curves/curve-view";
import { useDeeds } from "@/app/_components/palette/deed-registry";
import type { Deed } from "@/app/_components/palette/deeds";
import type { PageState } from "./page-state";

/** Traces that are offered to be hidden one by one; more would bury what else there is. */
const MOST = 12;

/** What the plot and the tabs of a run offer under "Find or do…". */
export function useViewDeeds(
  set: CurveSet | null,
  state: PageState,
  show: (change: Partial<PageState>) => void,
): void {
  useDeeds("here", set === null ? [] : deedsOf(set, state, show), 1);
}

function deedsOf(set: CurveSet, state: PageState, show: (change: Partial<PageState>) => void): Deed[] {
  const { traces } = choiceOf(set, state);
  const names = set.traces.map(({ name }) => name);
  const isHidden = names.some((name) => !traces.includes(name));
  return [
    state.tab === "curves"
      ? {
          id: "numbers",
          words: "Table of numbers",
          also: "points values",
          does: () => show({ tab: "numbers" }),
        }
      : { id: "curves", words: "Curves", also: "plot", does: () => show({ tab: "curves" }) },
    ...(state.zoom === null
      ? []
      : [{ id: "whole", words: "Whole sweep", also: "zoom out all", does: () => show({ zoom: null }) }]),
    ...(names.length > 1 && names.length <= MOST
      ? names.map((name) => {
          const isShown = traces.includes(name);
          return {
            id: `trace ${name}`,
            words: `${isShown ? "Hide" : "Draw"} trace ${name}`,
            also: "curve line",
            does: () =>
              show({
                tab: "curves",
                only: null,
                traces: names.filter((one) => (one === name ? !isShown : traces.includes(one))),
              }),
          };
        })
      : []),
    ...(isHidden || state.only != null
      ? [
          {
            id: "all",
            words: "Draw all traces",
            also: "show hidden",
            does: () => show({ traces: null, only: null, tab: "curves" }),
          },
        ]
      : []),
    ...(state.point === null
      ? []
      : [{ id: "point", words: "Choose no point", does: () => show({ point: null }) }]),
  ];
}
