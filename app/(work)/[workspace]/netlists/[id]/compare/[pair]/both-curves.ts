import type { CurveSource } from "@/app/_components/curves/curve-set";
import type { AxisDocument, RunDocument } from "@/lib/analyses/result";

interface Labelled {
  readonly revision: number;
  readonly document: RunDocument;
}

/**
 * Two runs as one source of curves, whose last axis is the revision: null where their sweeps are not the same to the last value, since
 * values that were never computed cannot be drawn. Only traces that both have are in it, and only the nominal design.
 */
export function bothCurves(before: Labelled, after: Labelled): CurveSource | null {
  const [a, b] = [before.document, after.document];
  if (!sameAxes(a.axes, b.axes) || a.axes.length === 0) return null;
  const points = a.axes.reduce((product, { values }) => product * values.length, 1);
  const nominal = <T>(column: readonly T[]) => column.slice(0, points);
  const traces = a.traces.flatMap(({ name, unit, values }) => {
    const other = b.traces.find((one) => one.name === name && one.unit === unit);
    return other === undefined
      ? []
      : [{ name, unit, values: [...nominal(values), ...nominal(other.values)] }];
  });
  const revisions: AxisDocument = {
    knob: "revision",
    unit: "1",
    scale: "list",
    values: [before.revision, after.revision],
  };
  return {
    axes: [...a.axes, revisions],
    traces,
    points: {
      outcome: [...nominal(a.points.outcome), ...nominal(b.points.outcome)],
      bound: [...nominal(a.points.bound), ...nominal(b.points.bound)],
    },
  };
}

/** Names of traces that only one of the two has. */
export function onlyIn(these: RunDocument, those: RunDocument): string[] {
  return these.traces
    .filter(({ name, unit }) => !those.traces.some((one) => one.name === name && one.unit === unit))
    .map(({ name }) => name);
}

function sameAxes(these: readonly AxisDocument[], those: readonly AxisDocument[]): boolean {
  return (
    these.length === those.length &&
    these.every(({ knob, unit, values }, k) => {
      const other = those[k]!;
      return (
        knob === other.knob &&
        unit === other.unit &&
        values.length === other.values.length &&
        values.every((value, i) => value === other.values[i])
      );
    })
  );
}
