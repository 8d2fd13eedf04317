import type { OutcomeKind } from "@/lib/solver/outcome";
import { type CurveSet, pointAt } from "./curve-set";
import { formatKnob } from "./figures-in-words";

/** Neighbouring places along the horizontal axis, both ends included, where points failed in one family or more. */
export interface FailedSpan {
  readonly first: number;
  readonly last: number;
}

/** What became of the points of some families: counts, and where along the axis points failed. */
export interface Account {
  readonly points: number;
  readonly solved: number;
  readonly failed: number;
  readonly waiting: number;
  readonly spans: readonly FailedSpan[];
  /** How points failed, each once, in the order met. */
  readonly outcomes: readonly Exclude<OutcomeKind, "converged">[];
}

export function accountOf(set: CurveSet, families: readonly number[]): Account {
  const { outcome } = set.source.points;
  const outcomes = new Set<Exclude<OutcomeKind, "converged">>();
  const spans: FailedSpan[] = [];
  let solved = 0;
  let failed = 0;
  let absent = 0;
  for (let place = 0; place < set.x.length; place++) {
    let here = false;
    for (const family of families) {
      if (set.source.absent?.[family]?.[set.order[place]!] === 1) {
        absent++;
        continue;
      }
      const kind = outcome[pointAt(set, family, place)] ?? null;
      if (kind === "converged") solved++;
      else if (kind !== null) {
        failed++;
        here = true;
        outcomes.add(kind);
      }
    }
    if (!here) continue;
    const before = spans.at(-1);
    if (before !== undefined && before.last === place - 1)
      spans[spans.length - 1] = { ...before, last: place };
    else spans.push({ first: place, last: place });
  }
  const points = set.x.length * families.length - absent;
  return { points, solved, failed, waiting: points - solved - failed, spans, outcomes: [...outcomes] };
}

/** Where points failed, in words: "V_in −0.5 V to −0.05 V, and at 1 V". At most four spans are spelt out. */
export function spansInWords(set: CurveSet, spans: readonly FailedSpan[]): string {
  const value = (place: number) => formatKnob(set.axis, set.x[place]!);
  const texts = spans
    .slice(0, 4)
    .map(({ first, last }) => (first === last ? value(first) : `${value(first)} to ${value(last)}`));
  const more = spans.length > 4 ? ` and ${spans.length - 4} more places` : "";
  return `${set.axis.knob} ${texts.join(", ")}${more}`;
}
