import type { Axis } from "./axes";
import { valueIn } from "./columns";
import type { Cursor } from "./cursor-layer";
import { downIn, STOREY_GAP } from "./nearest-line";
import type { StoreyView } from "./storey-views";

/** The chosen point: a copper pointer on the ruler, as on a slide rule, and a filled mark on each of its lines. */
export function ChosenMark({
  storeys,
  horizontal,
  x,
  width,
  chosen,
}: {
  readonly storeys: readonly StoreyView[];
  readonly horizontal: Axis;
  readonly x: Float64Array;
  readonly width: number;
  readonly chosen: Cursor;
}) {
  const { from, to } = horizontal.range;
  const at = x[chosen.place];
  if (at === undefined || at < from || at > to) return null;
  const left = (width * (at - from)) / (to - from);
  let top = 0;
  const marks = storeys.flatMap((storey) => {
    const offset = top;
    top += storey.height + STOREY_GAP;
    return storey.lines.flatMap((line) => {
      const value = line.family === chosen.family ? valueIn(line.values, chosen.place) : null;
      const down = value === null ? null : downIn(storey, value);
      return down === null ? [] : [{ key: line.key, top: offset + down }];
    });
  });
  return (
    <div aria-hidden="true" className="pointer-events-none absolute inset-0 z-10" data-chosen={chosen.place}>
      <div
        className="absolute top-0 h-full border-accent border-l border-dashed opacity-60"
        style={{ left }}
      />
      <svg aria-hidden="true" width="12" height="9" className="absolute bottom-0 -ml-1.5" style={{ left }}>
        <path d="M0 0H12L6 9z" fill="var(--accent)" />
      </svg>
      {marks.map(({ key, top: at }) => (
        <span
          key={key}
          className="absolute size-2.25 -translate-x-1/2 -translate-y-1/2 rounded-full border-2 border-paper bg-accent"
          style={{ left, top: at }}
        />
      ))}
    </div>
  );
}
