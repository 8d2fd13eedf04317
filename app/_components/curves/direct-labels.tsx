import { classNames } from "@/app/_components/ui/class-names";
import type { Axis } from "./axes";
import { lineEnds } from "./direct-places";
import { cssColour } from "./line-style";
import type { StoreyView } from "./storey-views";

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
  return (
    <div aria-hidden="true">
      {lineEnds(storey, horizontal, x, followed).map(({ line, at }) => (
        <span
          key={line.key}
          className={classNames(
            "figures absolute left-full ml-1.5 flex -translate-y-1/2 items-center gap-1.5 whitespace-nowrap text-xs leading-none",
            followed !== null && line.family !== followed && "opacity-50",
          )}
          data-family={line.family}
          style={{ top: at }}
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
      ))}
    </div>
  );
}
