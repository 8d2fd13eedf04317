import { classNames } from "@/app/_components/ui/class-names";
import { formatQuantity } from "@/lib/units/quantity";
import type { Axis } from "./axes";
import { valueIn } from "./columns";
import type { Cursor } from "./cursor-layer";
import type { CurveSet } from "./curve-set";
import { pointAt } from "./curve-set";
import { whyMissing } from "./failed-reasons";
import { formatKnob, formatValue } from "./figures-in-words";
import { downIn, STOREY_GAP } from "./nearest-line";
import type { StoreyView } from "./storey-views";
import type { Line } from "./storeys";

interface Props {
  readonly set: CurveSet;
  readonly storeys: readonly StoreyView[];
  readonly horizontal: Axis;
  readonly x: Float64Array;
  readonly width: number;
  readonly cursor: Cursor;
}

/** Px that a box with values needs beside the line. */
const NEEDED = 210;

/** The line of the cursor through all storeys, a ring on each line it crosses, and the values of the setting it follows. */
export function CursorMarks({ set, storeys, horizontal, x, width, cursor }: Props) {
  const { from, to } = horizontal.range;
  const left = (width * (x[cursor.place]! - from)) / (to - from);
  const tops = storeys.map((_, i) =>
    storeys.slice(0, i).reduce((sum, { height }) => sum + height + STOREY_GAP, 0),
  );
  const followed = storeys.flatMap((storey) =>
    storey.lines.filter(({ family }) => family === cursor.family).map((line) => ({ storey, line })),
  );
  const label = set.families[cursor.family]?.label ?? "";
  const bound = boundAt(set, cursor);
  const right = left < width / 2;
  const room = right ? width - left : left;
  const fits = room > NEEDED;
  return (
    <div aria-hidden="true" className="pointer-events-none">
      <div className="absolute top-0 h-full border-accent border-l" style={{ left }} />
      {storeys.map((storey, i) =>
        storey.lines.map((line) => {
          const value = valueIn(line.values, cursor.place);
          const down = value === null ? null : downIn(storey, value);
          if (down === null) return null;
          return (
            <span
              key={line.key}
              className={classNames(
                "absolute -translate-x-1/2 -translate-y-1/2 rounded-full border-accent bg-paper",
                line.family === cursor.family ? "size-2.25 border-2" : "size-1.75 border",
              )}
              style={{ left, top: tops[i]! + down }}
            />
          );
        }),
      )}
      <div
        className={classNames(
          "absolute border bg-surface px-2.5 py-1.5 text-xs",
          fits && !right && "-translate-x-full",
        )}
        style={{
          // Without room on either side it lies over the line, at the edge of the plot.
          ...(fits ? { left: left + (right ? 10 : -10) } : right ? { right: 0 } : { left: 0 }),
          top: Math.max(0, boxTop(storeys, cursor) - 8),
          maxWidth: fits ? room - 12 : width,
        }}
      >
        <p className="figures whitespace-nowrap text-xs">
          {formatKnob(set.axis, set.x[cursor.place]!)}
          {label !== "" && <span className="text-quiet">, {label}</span>}
        </p>
        {followed.map(({ storey, line }) => (
          <div key={line.key}>
            <p className="flex justify-between gap-4">
              <span className="whitespace-nowrap text-quiet">{line.trace}</span>
              {valueIn(line.values, cursor.place) === null ? (
                <span className="min-w-0 max-w-64 text-right text-xs">{missing(set, cursor)}</span>
              ) : (
                <span className="figures whitespace-nowrap text-xs">
                  {formatValue(valueIn(line.values, cursor.place), line.unit)}
                </span>
              )}
            </p>
            <DrawsHere storey={storey} line={line} place={cursor.place} />
          </div>
        ))}
        {bound !== null && (
          <p className="figures whitespace-nowrap text-quiet text-xs">
            proved within {formatQuantity(bound, "V", 2)}
          </p>
        )}
      </div>
    </div>
  );
}

/** The band and the worst draw of a line at a place. */
function DrawsHere({
  storey: { bands, worst },
  line: { key, unit },
  place,
}: {
  readonly storey: StoreyView;
  readonly line: Line;
  readonly place: number;
}) {
  const band = bands.find((one) => one.key === key);
  const low = band === undefined ? null : valueIn(band.low, place);
  const high = band === undefined ? null : valueIn(band.high, place);
  const own = worst.find((one) => one.key === `${key} worst`);
  const value = own === undefined ? null : valueIn(own.values, place);
  return (
    <>
      {low !== null && high !== null && (
        <p className="figures whitespace-nowrap text-quiet text-xs">
          draws {formatQuantity(low, unit, 4)} to {formatQuantity(high, unit, 4)}
        </p>
      )}
      {value !== null && (
        <p className="figures whitespace-nowrap text-quiet text-xs">
          worst draw {formatQuantity(value, unit, 4)}
        </p>
      )}
    </>
  );
}

/** Why there is no value at the cursor. */
export function missing(set: CurveSet, { family, place }: Cursor): string {
  if (set.source.absent?.[family]?.[place] === 1) return "no point here";
  return whyMissing(set.source, pointAt(set, family, place));
}

function boundAt(set: CurveSet, { family, place }: Cursor): number | null {
  const { bound } = set.source.points;
  return bound === undefined ? null : valueIn(bound, pointAt(set, family, place));
}

/** Below the followed line in the first storey, or above it where there is no room below. */
function boxTop(storeys: readonly StoreyView[], cursor: Cursor): number {
  const [first] = storeys;
  const line = first?.lines.find(({ family }) => family === cursor.family);
  const value = line === undefined ? null : valueIn(line.values, cursor.place);
  const down = first === undefined || value === null ? null : downIn(first, value);
  if (first === undefined || down === null) return 48;
  return down > first.height / 2 ? Math.max(32, down - 88) : down + 24;
}
