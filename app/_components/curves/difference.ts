import { atLeast } from "./columns";
import { type CurveSet, columnOf, curveSet } from "./curve-set";
import type { CurveSource } from "./curve-source";
import { shownValue } from "./figures-in-words";
import type { Labelled, Overlaid } from "./overlay";

/** A setting of each side that are compared. */
interface Pair {
  readonly a: number;
  readonly b: number;
}

/**
 * What b has over a: b − a, trace by trace, at the values of the first knob that a swept and b reaches over. Where b has that very
 * value the difference is exact; elsewhere b is taken on the straight line between its neighbours, over the decade where it is swept
 * by decades, and the note says how many. Settings are paired by equal values of the same outer knobs; a single setting on each side
 * is paired whatever it is.
 */
export function difference(a: Labelled, b: Labelled): Overlaid {
  const [one, other] = [curveSet(a.source), curveSet(b.source)];
  if (one === null || other === null) return { problem: "There is no sweep to compare." };
  if (one.axis.knob !== other.axis.knob || one.axis.unit !== other.axis.unit) {
    return {
      problem: `“${a.label}” sweeps ${one.axis.knob} and “${b.label}” sweeps ${other.axis.knob}, so they cannot be compared point by point.`,
    };
  }
  const pairs = pairsOf(one, other);
  if (pairs.length === 0) return { problem: `“${a.label}” and “${b.label}” have no setting in common.` };
  const x = one.x.filter((value) => value >= other.x[0]! && value <= other.x.at(-1)!);
  if (x.length === 0)
    return { problem: `“${a.label}” and “${b.label}” have no part of the sweep in common.` };
  const common = one.traces.filter(({ name, unit }) =>
    other.traces.some((trace) => trace.name === name && trace.unit === unit),
  );
  if (common.length === 0) return { problem: `“${a.label}” and “${b.label}” show no trace in common.` };
  const from = atLeast(one.x, x[0]!);
  const weights = weightsOf(other, x);
  const columns = common.map((trace) => {
    const partner = other.traces.find(({ name }) => name === trace.name)!;
    const values = new Float64Array(x.length * pairs.length);
    pairs.forEach((pair, i) => {
      const [own, against] = [columnOf(one, trace, pair.a), columnOf(other, partner, pair.b)];
      weights.forEach(({ below, share }, k) => {
        const low = against[below]!;
        const there = share === 0 ? low : low + share * (against[below + 1]! - low);
        values[i * x.length + k] = there - own[from + k]!;
      });
    });
    return { name: `Δ ${trace.name}`, unit: trace.unit, values };
  });
  const between = weights.filter(({ share }) => share !== 0).length;
  return {
    source: {
      axes: [{ ...one.axis, values: [...x] }, ...settingsOf(one, pairs)],
      traces: columns,
      points: { outcome: outcomesOf(columns, x.length * pairs.length) },
      note: noteOf(a.label, b.label, one.axis.knob, x.length, between),
    },
  };
}

function pairsOf(one: CurveSet, other: CurveSet): Pair[] {
  if (one.families.length === 1 && other.families.length === 1) return [{ a: 0, b: 0 }];
  const labels = new Map(other.families.map(({ index, label }) => [label, index]));
  return one.families.flatMap(({ index, label }) => {
    const found = labels.get(label);
    return found === undefined ? [] : [{ a: index, b: found }];
  });
}

/** Where values stand among those of a sweep: at or above the one `below`, by a share of the way to the next. */
function weightsOf(set: CurveSet, x: Float64Array): { below: number; share: number }[] {
  const isLogarithmic = set.axis.scale === "logarithmic" && set.x[0]! > 0;
  const place = (value: number) => (isLogarithmic ? Math.log(value) : shownValue(set.axis, value));
  return Array.from(x, (value) => {
    const after = atLeast(set.x, value);
    if (set.x[after] === value) return { below: after, share: 0 };
    const [low, high] = [place(set.x[after - 1]!), place(set.x[after]!)];
    return { below: after - 1, share: (place(value) - low) / (high - low) };
  });
}

/** The settings that are compared, as one axis with names; none where there is one pair. */
function settingsOf(set: CurveSet, pairs: readonly Pair[]): CurveSource["axes"] {
  if (pairs.length === 1) return [];
  const names = pairs.map(({ a }) => set.families[a]!.label);
  return [{ knob: "setting", unit: "1", scale: "list", values: names.map((_, i) => i), names }];
}

function outcomesOf(columns: readonly { readonly values: Float64Array }[], length: number) {
  return Array.from({ length }, (_, k) =>
    columns.some(({ values }) => Number.isFinite(values[k])) ? ("converged" as const) : null,
  );
}

function noteOf(a: string, b: string, knob: string, points: number, between: number): string {
  const what = `The difference is “${b}” less “${a}”`;
  if (between === 0) return `${what}, at values of ${knob} that both have.`;
  const exact = points - between;
  const where = exact === 0 ? "none of its points" : `${exact} of its ${points} points`;
  return `${what}. At ${where} both have the same value of ${knob}; at the others “${b}” is taken between its neighbours.`;
}
