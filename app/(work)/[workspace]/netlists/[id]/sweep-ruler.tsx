import type { SweepSummary } from "@/app/_components/editor/examine";
import { formatCount } from "@/app/_components/ui/count";
import { formatAxis } from "@/lib/units/quantity";
import { rulerTicks } from "./ruler-ticks";

const WIDTH = 320;
const HEIGHT = 22;

/** A sweep drawn on its ruler: decades for a logarithmic one, the values themselves as points below it. */
export function SweepRuler({ sweep, role }: { readonly sweep: SweepSummary; readonly role: string }) {
  const { knob, count } = sweep;
  const { ticks, points, decades } = rulerTicks(sweep);
  const [first, last] = [sweep.values[0], sweep.values.at(-1)];
  const span = decades === null ? "" : `${Number(Math.abs(decades).toFixed(2))} decades, `;
  return (
    <>
      <div className="flex flex-wrap items-baseline justify-between gap-x-4 text-sm">
        <span className="figures min-w-0 break-words">{knob}</span>
        <span className="text-quiet text-xs">
          {span}
          {formatCount(count)} values, {role}
        </span>
      </div>
      <svg
        viewBox={`-1 0 ${WIDTH + 2} ${HEIGHT}`}
        preserveAspectRatio="none"
        width="100%"
        height={HEIGHT}
        fill="none"
        aria-hidden="true"
        className="mt-2"
      >
        <path
          d={ticks.map(({ at, length }) => `M${x(at)} 0V${length}`).join("")}
          stroke="var(--edge)"
          vectorEffect="non-scaling-stroke"
        />
        <path d={`M0 .5H${WIDTH}`} stroke="var(--ink)" vectorEffect="non-scaling-stroke" />
        <path
          d={points.map((at) => `M${x(at)} 16V21`).join("")}
          stroke="var(--accent)"
          strokeOpacity={points.length > 60 ? 0.55 : 1}
          vectorEffect="non-scaling-stroke"
        />
      </svg>
      <div className="figures flex justify-between text-quiet text-xs">
        <span>{first === undefined ? "" : valueText(first, sweep)}</span>
        <span>{last === undefined || count === 1 ? "" : valueText(last, sweep)}</span>
      </div>
    </>
  );
}

function x(at: number): string {
  return (at * WIDTH).toFixed(2);
}

function valueText(value: number, { knob, unit }: SweepSummary): string {
  return knob === "temperature"
    ? formatAxis(Number((value - 273.15).toPrecision(9)), "°C")
    : formatAxis(value, unit);
}
