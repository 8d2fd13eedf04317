"use client";

import { useEffect, useState } from "react";
import type { CurveSource } from "@/app/_components/curves/curve-set";
import { fetchOverview } from "./fetch-run";

/** Ms that drawing the overview is left alone for before the whole is fetched. */
const DRAWING = 60;

/** The curves from afar, and a promise of when fetching the whole holds up nothing more. */
export interface Overview {
  readonly source: CurveSource | null;
  readonly over: Promise<void>;
}

/** Fetches what a large run looks like from afar, where it `exists`; of its traces the first `shown` are those of the netlist, the others readings. */
export function useOverview(workspace: string, id: string, shown: number, exists: boolean): Overview {
  const [source, setSource] = useState<CurveSource | null>(null);
  const [{ over, end }] = useState(() => {
    let end = () => {};
    const over = new Promise<void>((resolve) => {
      end = resolve;
    });
    return { over, end };
  });
  useEffect(() => {
    if (!exists) return end();
    fetchOverview(workspace, id).then(
      ({ axes, traces, points }) => {
        setSource({ axes, traces: traces.slice(0, shown), read: traces.slice(shown), points });
        setTimeout(end, DRAWING);
      },
      // Without it the whole comes a moment later.
      end,
    );
  }, [workspace, id, shown, exists, end]);
  return { source, over };
}
