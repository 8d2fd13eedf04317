import type { RunDocument } from "./result";

/** What a requirement allows a trace over a part of the first sweep; null on a side without a limit. */
export interface AllowedBand {
  readonly label: string;
  /** Name of the trace, or of a reading per point. */
  readonly trace: string;
  /** Of the first knob, coherent SI units. */
  readonly from: number;
  readonly to: number;
  readonly low: number | null;
  readonly high: number | null;
  /** Windows of the outer knobs: it holds for those settings alone. */
  readonly at: readonly { readonly knob: string; readonly low: number; readonly high: number }[];
}

/** The bands that can be shaded behind the curves: of requirements on plain traces whose limits are the same at all their points. */
export function allowedBands({
  axes,
  requirements,
}: Pick<RunDocument, "axes" | "requirements">): AllowedBand[] {
  const [first] = axes;
  if (first === undefined) return [];
  const ends = {
    low: first.values.reduce((a, b) => Math.min(a, b)),
    high: first.values.reduce((a, b) => Math.max(a, b)),
  };
  return requirements.flatMap(({ label, bounds, windows }) => {
    if (!bounds || (bounds.low === null && bounds.high === null)) return [];
    const { trace, low, high } = bounds;
    const own = windows.find(({ knob }) => knob === first.knob);
    const at = windows.filter(({ knob }) => knob !== first.knob);
    const from = Math.max(ends.low, own?.low ?? ends.low);
    const to = Math.min(ends.high, own?.high ?? ends.high);
    return from > to ? [] : [{ label, trace, from, to, low, high, at }];
  });
}
