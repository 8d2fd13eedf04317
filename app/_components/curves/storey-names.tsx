import type { Axis } from "./axes";
import { acrossField, downField } from "./line-path";
import { placeOf } from "./scale";
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
  const { axis, traces, isReading, allowed, folds, height } = storey;
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
      {folds.map(({ across, value, label }) => {
        const left = acrossField(field, across);
        const place = placeOf(axis.mapping, value);
        const down = place === null ? null : downField(field, place);
        if (down === null || left < 0 || left > width || down < 0 || down > height) return null;
        return (
          <span key={`${across} ${value}`} data-fold={label}>
            <span
              className="absolute size-2 -translate-x-1/2 -translate-y-1/2 rotate-45 border-2 border-ink bg-paper"
              style={{ left, top: down }}
            />
            {label !== "" && (
              <span
                className="figures absolute whitespace-nowrap bg-paper/80 px-1 text-xs leading-none"
                style={{ left: left + 8, top: down < 24 ? down + 8 : down - 18 }}
              >
                fold {label}
              </span>
            )}
          </span>
        );
      })}
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
