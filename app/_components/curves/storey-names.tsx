import type { Axis } from "./axes";
import { acrossField, downField } from "./line-path";
import type { StoreyView } from "./storey-views";

/** What a storey shows, in its corner, and what each shaded part of it is allowed by. */
export function StoreyNames({
  storey,
  horizontal,
  width,
}: {
  readonly storey: StoreyView;
  readonly horizontal: Axis;
  readonly width: number;
}) {
  const { axis, traces, isReading, allowed, height } = storey;
  const field = { horizontal: horizontal.range, vertical: axis.range, left: 0, top: 0, width, height };
  return (
    <div aria-hidden="true">
      <p className="absolute top-1 left-2 z-10 max-w-full truncate bg-paper/80 pr-1 text-xs">
        {traces.join(", ")}
        <span className="figures ml-2 text-quiet text-xs">
          {axis.labels.unit === "1" ? "" : axis.labels.unit}
        </span>
        {isReading && <span className="ml-2 text-quiet">read at each point</span>}
      </p>
      {allowed.map((shade, i) => {
        const left = Math.max(0, acrossField(field, shade.from));
        const right = Math.min(width, acrossField(field, shade.to));
        const edge = shade.low ?? shade.high;
        const down = edge === null ? null : downField(field, edge);
        if (down === null || right - left < 90 || down < 0 || down > height) return null;
        const above = down > height - 18;
        return (
          <p
            // biome-ignore lint/suspicious/noArrayIndexKey: bands have no name of their own, and their order is that of the netlist.
            key={i}
            className="absolute truncate px-1.5 text-holds text-xs leading-none"
            style={{ left, maxWidth: right - left, top: above ? down - 15 : down + 4 }}
          >
            {shade.label}
          </p>
        );
      })}
    </div>
  );
}
