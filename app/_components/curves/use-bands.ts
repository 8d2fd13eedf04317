"use client";

import { useEffect, useState } from "react";
import type { BandAnswer, BandQuestion } from "./band-worker";
import { columnFrom } from "./columns";
import type { CurveSet } from "./curve-set";
import { ordered } from "./figure-bands";
import type { Band } from "./storey-views";

const NONE: ReadonlyMap<string, Band> = new Map();

/**
 * The bands of the draws of the traces named, by the key of a line. They are counted in a thread of their own and come one trace
 * after another; none without draws, while `wanted` is false, and until the first is there.
 */
export function useBands(
  set: CurveSet,
  traces: readonly string[],
  wanted: boolean,
): ReadonlyMap<string, Band> {
  const [found, setFound] = useState<{ set: CurveSet; bands: ReadonlyMap<string, Band> } | null>(null);
  const names = traces.join("\n");

  useEffect(() => {
    if (!wanted || set.draws === 0) return;
    const asked = set.traces.filter(
      ({ name, values }) => names.split("\n").includes(name) && values.length > 0,
    );
    const worker = new Worker(new URL("./band-worker.ts", import.meta.url), { type: "module" });
    const bands = new Map<string, Band>();
    worker.onmessage = ({ data }: MessageEvent<BandAnswer>) => {
      const trace = asked[data.job]!;
      for (const { index } of set.families) {
        bands.set(`${trace.name} ${index}`, {
          low: ordered(set, data.low, index),
          high: ordered(set, data.high, index),
        });
      }
      setFound({ set, bands: new Map(bands) });
    };
    asked.forEach(({ values }, job) => {
      const question: BandQuestion = {
        job,
        values: columnFrom(values),
        length: set.x.length,
        families: set.families.length,
        draws: set.draws,
      };
      worker.postMessage(question);
    });
    return () => worker.terminate();
  }, [set, names, wanted]);

  return found !== null && wanted && isAlike(found.set, set) ? found.bands : NONE;
}

/** While more results of one run come in, the bands of a moment ago stand until there are new ones. */
function isAlike(one: CurveSet, other: CurveSet): boolean {
  return (
    one === other ||
    (one.draws === other.draws &&
      one.x.length === other.x.length &&
      one.families.length === other.families.length &&
      one.axis.knob === other.axis.knob)
  );
}
