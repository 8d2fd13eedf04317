import type { Axis } from "./curve-view";

const LENGTHS = [13, 9, 5] as const;

/** The ruler under all storeys: decades (or steps) numbered, the ticks between engraved, drawn to the plot's own scale. */
export function RulerAxis({
  axis,
  knob,
  width,
}: {
  readonly axis: Axis;
  readonly knob: string;
  readonly width: number;
}) {
  const { from, to } = axis.range;
  const across = (place: number) => (width * (place - from)) / (to - from);
  const engraved = axis.ticks
    .map(({ place, rank }) => `M${across(place).toFixed(2)} 0V${LENGTHS[rank]}`)
    .join("");
  return (
    <div className="relative h-13" style={{ width }} aria-hidden="true">
      <svg
        aria-hidden="true"
        width={width}
        height="14"
        className="absolute top-0 overflow-visible"
        fill="none"
      >
        <path d={`M0 0.5H${width}`} stroke="var(--ink)" />
        <path d={engraved} stroke="var(--ink)" />
      </svg>
      {axis.ticks.map((tick) => {
        const text = axis.labels.texts.get(tick);
        if (text === undefined) return null;
        return (
          <span
            key={tick.place}
            className="figures absolute top-4 -translate-x-1/2 whitespace-nowrap text-quiet text-xs leading-none"
            style={{ left: across(tick.place) }}
          >
            {text}
          </span>
        );
      })}
      <span className="absolute top-8.5 left-1/2 -translate-x-1/2 text-xs leading-none">{knob}</span>
    </div>
  );
}
