import type { Axis, StoreyView } from "./curve-view";
import { placeLabels } from "./label-places";
import { placeOf } from "./scale";

/** Px between the middles of two labels. */
const GAP = 15;
/** Px from the edge of a storey to the middle of its outermost label, so that storeys keep their labels apart. */
const EDGE = 5;

/** Labels at the ends of the lines, moved apart where they would touch; each with a piece of its line. */
export function DirectLabels({
  storey,
  horizontal,
  x,
}: {
  readonly storey: StoreyView;
  readonly horizontal: Axis;
  readonly x: readonly number[];
}) {
  const { axis, height, lines } = storey;
  const down = (place: number) => (height * (axis.range.to - place)) / (axis.range.to - axis.range.from);
  const wishes = lines.flatMap((line) => {
    const at = lastPlace(line.values, x, horizontal, axis);
    return line.label === "" || at === null ? [] : [{ key: line.key, at: down(at) - EDGE }];
  });
  const places = placeLabels(wishes, height - 2 * EDGE, GAP);
  return (
    <div aria-hidden="true">
      {lines.map((line) => {
        const top = places.get(line.key);
        if (top === undefined) return null;
        return (
          <span
            key={line.key}
            className="figures absolute left-full ml-1.5 flex -translate-y-1/2 items-center gap-1.5 whitespace-nowrap text-xs leading-none"
            style={{ top: top + EDGE }}
          >
            <svg aria-hidden="true" width="14" height="4" viewBox="0 0 14 4" fill="none">
              <path
                d="M0 2H14"
                stroke={`var(${line.style.colour})`}
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
function lastPlace(
  values: readonly (number | null)[],
  x: readonly number[],
  horizontal: Axis,
  axis: Axis,
): number | null {
  for (let i = values.length - 1; i >= 0; i--) {
    const at = x[i]!;
    const value = values[i] ?? null;
    if (value === null || at > horizontal.range.to || at < horizontal.range.from) continue;
    return placeOf(axis.mapping, value);
  }
  return null;
}
