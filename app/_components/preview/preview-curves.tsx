"use client";

import { memo, useContext, useMemo, useState } from "react";
import { CurveFigure } from "@/app/_components/curves/curve-figure";
import { type CurveSource, curveSet } from "@/app/_components/curves/curve-set";
import { type CurveView, USUAL_VIEW } from "@/app/_components/curves/curve-view";
import { formatValue } from "@/app/_components/curves/figures-in-words";
import { allowedBands } from "@/lib/analyses/allowed-bands";
import { OUTCOMES } from "@/lib/solver/outcome";
import { KeptView } from "./kept-view";
import type { Outline, Row } from "./messages";

interface Props {
  readonly outline: Outline;
  readonly row: Row;
  /** The place along the whole sweep that is read. */
  readonly place: number;
  readonly onPlace: (place: number) => void;
}

/** The curves of a previewed row; for a netlist that sweeps nothing, its one operating point. */
export const PreviewCurves = memo(function PreviewCurves({ outline, row, place, onPlace }: Props) {
  const kept = useContext(KeptView);
  const [own, setOwn] = useState<CurveView>(USUAL_VIEW);
  const source = useMemo(() => sourceOf(row), [row]);
  const set = useMemo(() => curveSet(source), [source]);
  const allowed = useMemo(() => allowedBands(row), [row]);
  if (set === null) return <OnePoint source={source} />;
  const whole = outline.axes[0]?.values ?? [];
  const solved = row.axes[0]!.values;
  return (
    <CurveFigure
      set={set}
      name="Curves of the preview"
      view={kept?.view ?? own}
      onView={kept?.onView ?? ((change) => setOwn((before) => ({ ...before, ...change })))}
      point={nearestIn(solved, whole[place] ?? solved[0]!)}
      onPoint={(point) => onPlace(nearestIn(whole, solved[point]!))}
      waiting={null}
      allowed={allowed}
      brief
    />
  );
});

function sourceOf(row: Row): CurveSource {
  return {
    axes: row.axes,
    traces: row.traces,
    points: {
      outcome: Array.from(row.outcome, (index) => OUTCOMES[index] ?? null),
      bound: row.bound,
    },
    readings: row.readings,
    failures: row.failures,
  };
}

function nearestIn(values: readonly number[], wanted: number): number {
  let best = 0;
  values.forEach((value, index) => {
    if (Math.abs(value - wanted) < Math.abs(values[best]! - wanted)) best = index;
  });
  return best;
}

function OnePoint({ source }: { readonly source: CurveSource }) {
  return (
    <div>
      <p className="text-quiet text-sm">Nothing is swept, so there is one operating point and no curve.</p>
      <dl aria-label="Operating point" className="mt-2 border-t text-sm">
        {source.traces.map(({ name, unit, values }) => (
          <div key={name} className="flex justify-between gap-4 border-b py-1.5">
            <dt className="figures min-w-0 break-words">{name}</dt>
            <dd className="figures whitespace-nowrap">
              {formatValue(Number.isFinite(values[0]) ? values[0]! : null, unit)}
            </dd>
          </div>
        ))}
      </dl>
    </div>
  );
}
