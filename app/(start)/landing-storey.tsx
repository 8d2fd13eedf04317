import { classNames } from "@/app/_components/ui/class-names";

export interface StoreyLine {
  readonly values: readonly number[];
  readonly stroke: string;
  readonly dash: string;
  readonly label: string;
}

interface Range {
  readonly from: number;
  readonly to: number;
  readonly ticks: readonly number[];
}

interface StoreyProps {
  readonly name: string;
  readonly unit: string;
  /** What a value is multiplied by before it is written at a tick. */
  readonly scale?: number;
  /** Height in px. */
  readonly height: number;
  readonly range: Range;
  /** Abscissae, log10 of the swept value. */
  readonly x: readonly number[];
  readonly lines: readonly StoreyLine[];
  /** The allowed band, shaded; `from` and `to` as log10. */
  readonly band?: { readonly from: number; readonly to: number; readonly low: number; readonly high: number };
}

/** Room for the figures left of a storey and the labels right of it. */
const GUTTERS = "ml-11 mr-12";

/**
 * One storey of a plot. Lines are drawn in a box stretched to the place, with strokes that do not stretch; words stand
 * over it as text, so that they keep their size at every width.
 */
export function Storey({ name, unit, scale = 1, height, range, x, lines, band }: StoreyProps) {
  const left = x[0] ?? 0;
  const right = x.at(-1) ?? 1;
  const across = (value: number) => (1000 * (value - left)) / (right - left);
  const down = (value: number) => (1000 * (range.to - value)) / (range.to - range.from);
  const path = (values: readonly number[]) =>
    values
      .map((v, i) => `${i === 0 ? "M" : "L"}${across(x[i] ?? 0).toFixed(1)} ${down(v).toFixed(1)}`)
      .join("");
  const grid = Array.from({ length: Math.round(right - left) + 1 }, (_, k) => across(Math.round(left) + k));
  return (
    <div className={classNames("relative", GUTTERS)} style={{ height }} aria-hidden="true">
      <svg
        aria-hidden="true"
        viewBox="0 0 1000 1000"
        preserveAspectRatio="none"
        className="absolute inset-0 size-full overflow-hidden"
      >
        <g stroke="var(--grid)" vectorEffect="non-scaling-stroke">
          {grid.map((at) => (
            <path key={at} d={`M${at.toFixed(1)} 0V1000`} vectorEffect="non-scaling-stroke" />
          ))}
          {range.ticks.map((tick) => (
            <path key={tick} d={`M0 ${down(tick).toFixed(1)}H1000`} vectorEffect="non-scaling-stroke" />
          ))}
        </g>
        {band !== undefined && (
          <path
            d={`M${across(band.from)} ${down(band.high)}H${across(band.to)}V${down(band.low)}H${across(band.from)}z`}
            fill="var(--holds)"
            fillOpacity="0.08"
            stroke="var(--holds)"
            strokeDasharray="3 3"
            vectorEffect="non-scaling-stroke"
          />
        )}
        {lines.map((line) => (
          <path
            key={line.stroke}
            d={path(line.values)}
            fill="none"
            stroke={line.stroke}
            strokeWidth="1.75"
            strokeDasharray={line.dash}
            vectorEffect="non-scaling-stroke"
          />
        ))}
      </svg>
      {range.ticks.map((tick) => (
        <span
          key={tick}
          className="figures absolute right-full mr-2 -translate-y-1/2 text-quiet text-xs"
          style={{ top: `${down(tick) / 10}%` }}
        >
          {(tick * scale).toFixed(scale === 1 ? 1 : 0).replace("-", "\u2212")}
        </span>
      ))}
      <span className="absolute top-1 left-1.5 text-xs">
        {name} <span className="figures ml-1 text-quiet text-xs">{unit}</span>
      </span>
      {lines.map(
        (line) =>
          line.label !== "" && (
            <span
              key={line.label}
              className="figures absolute left-full ml-1.5 -translate-y-1/2 whitespace-nowrap text-xs"
              style={{ top: `${labelTop(lines, line, down)}%` }}
            >
              {line.label}
            </span>
          ),
      )}
    </div>
  );
}

/** Where a line's label stands, in percent of the height: at its end, but at least 7 % from the label before it. */
function labelTop(lines: readonly StoreyLine[], line: StoreyLine, down: (value: number) => number): number {
  const end = (of: StoreyLine) => down(of.values.at(-1) ?? 0) / 10;
  const order = [...lines].sort((a, b) => end(a) - end(b));
  const middle = order[Math.floor(order.length / 2)] ?? line;
  return end(middle) + 7 * (order.indexOf(line) - order.indexOf(middle));
}

/** The decade ruler under both storeys: one label a decade. */
export function RulerAxis({ labels }: { readonly labels: readonly string[] }) {
  const decades = labels.length - 1;
  const ticks = labels.map((_, decade) => `M${(1000 * decade) / decades} 0V12`);
  for (let decade = 0; decade < decades; decade++) {
    for (let m = 2; m <= 9; m++) {
      ticks.push(`M${((1000 * (decade + Math.log10(m))) / decades).toFixed(1)} 0V${m === 5 ? 8 : 5}`);
    }
  }
  return (
    <div className={classNames("relative h-9", GUTTERS)} aria-hidden="true">
      <svg
        aria-hidden="true"
        viewBox="0 0 1000 12"
        preserveAspectRatio="none"
        className="absolute inset-x-0 top-0 h-3 w-full overflow-visible"
      >
        <path
          d={`M0 0H1000${ticks.join("")}`}
          stroke="var(--ink)"
          fill="none"
          vectorEffect="non-scaling-stroke"
        />
      </svg>
      {labels.map((label, decade) => (
        <span
          key={label}
          className={classNames(
            "figures absolute top-3.5 -translate-x-1/2 whitespace-nowrap text-quiet text-xs",
            decade % 2 === 1 && "hidden sm:inline",
          )}
          style={{ left: `${(100 * decade) / decades}%` }}
        >
          {label.replace(" ", "\u202f")}
        </span>
      ))}
    </div>
  );
}
