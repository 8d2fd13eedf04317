import { classNames } from "@/app/_components/ui/class-names";
import type { Axis } from "./axes";
import { placeLabels } from "./label-places";
import { inView } from "./line-path";
import { cssColour } from "./line-style";
import { placeOf } from "./scale";
import type { StoreyView } from "./storey-views";
import type { Line } from "./storeys";

/** Px between the middles of two labels. */
const GAP = 15;
/** Px from the edge of a storey to the middle of its outermost label, so that storeys keep their labels apart. */
const EDGE = 5;

/** Labels at the ends of the lines, moved apart where they would touch; each with a piece of its line. */
export function DirectLabels({
  storey,
  horizontal,
  x,
  followed,
}: {
  readonly storey: StoreyView;
  readonly horizontal: Axis;
  readonly x: Float64Array;
  /** The setting that the reader follows. */
  readonly followed: number | null;
}) {
  const { axis, height, lines } = storey;
  const down = (place: number) => (height * (axis.range.to - place)) / (axis.range.to - axis.range.from);
  const wishes = lines.flatMap((line) => {
    const at = lastPlace(line, x, horizontal, axis);
    return line.label === "" || at === null ? [] : [{ key: line.key, at: down(at) - EDGE }];
  });
  const kept = lines.find(({ family }) => family === followed)?.key ?? null;
  const places = placeLabels(wishes, height - 2 * EDGE, GAP, kept);
  return (
    <div aria-hidden="true">
      {lines.map((line) => {
        const top = places.get(line.key);
        if (top === undefined) return null;
        return (
          <span
            key={line.key}
            className={classNames(
              "figures absolute left-full ml-1.5 flex -translate-y-1/2 items-center gap-1.5 whitespace-nowrap text-xs leading-none",
              followed !== null && line.family !== followed && "opacity-50",
            )}
            data-family={line.family}
            style={{ top: top + EDGE }}
          >
            <svg aria-hidden="true" width="14" height="4" viewBox="0 0 14 4" fill="none">
              <path
                d="M0 2H14"
                stroke={cssColour(line.style)}
                strokeWidth="2"
                strokeDasharray={line.style.dash.join(" ")}
              />
            </svg>
            {line.label}
          </span>
        );
      })}
    </div>
  );
}

/** The place on the vertical axis where a line last stands inside the view. */
function lastPlace({ values }: Line, x: Float64Array, horizontal: Axis, axis: Axis): number | null {
  const { from, to } = horizontal.range;
  for (let i = inView(x, horizontal.range).end - 1; i >= 0 && x[i]! >= from; i--) {
    if (x[i]! <= to && Number.isFinite(values[i])) return placeOf(axis.mapping, values[i]!);
  }
  return null;
}
