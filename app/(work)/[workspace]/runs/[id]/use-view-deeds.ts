"use client";

import type { CurveSet } from "@/app/_components/curves/curve-set";
import { useDeeds } from "@/app/_components/palette/deed-registry";
import type { PageState } from "./page-state";

/** What the tabs of a run and its chosen point offer under "Find or do…". */
export function useViewDeeds(
  set: CurveSet | null,
  { tab, point }: PageState,
  show: (change: Partial<PageState>) => void,
): void {
  const other =
    tab === "curves"
      ? ({ id: "numbers", words: "Table of numbers", also: "points values" } as const)
      : ({ id: "curves", words: "Curves", also: "plot" } as const);
  useDeeds(
    "here",
    set !== null
      ? [
          { ...other, does: () => show({ tab: other.id }) },
          ...(point === null
            ? []
            : [{ id: "point", words: "Choose no point", does: () => show({ point: null }) }]),
        ]
      : [],
    1,
  );
}
