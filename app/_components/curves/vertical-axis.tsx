import type { Axis } from "./axes";

/** Figures left of a storey; on a logarithmic axis the engraved ticks of a ruler too. */
export function VerticalAxis({ axis, height }: { readonly axis: Axis; readonly height: number }) {
  const { from, to } = axis.range;
  const down = (place: number) => (height * (to - place)) / (to - from);
  const engraved = axis.mapping.scale === "logarithmic";
  return (
    <div aria-hidden="true">
      {axis.ticks.map((tick) => {
        const text = axis.labels.texts.get(tick);
        if (text === undefined) return null;
        return (
          <span
            key={tick.place}
            className="figures absolute right-full mr-3 -translate-y-1/2 whitespace-nowrap text-quiet text-xs leading-none"
            style={{ top: down(tick.place) }}
          >
            {text}
          </span>
        );
      })}
      <svg
        aria-hidden="true"
        className="absolute top-0 right-full overflow-visible text-edge"
        width="9"
        height={height}
        stroke="currentColor"
        fill="none"
      >
        <path d={`M9 0V${height}`} />
        {engraved && (
          <path
            d={axis.ticks
              .map(({ place, rank }) => `M9 ${down(place).toFixed(1)}H${rank === 0 ? 0 : rank === 1 ? 3 : 5}`)
              .join("")}
          />
        )}
      </svg>
    </div>
  );
}
