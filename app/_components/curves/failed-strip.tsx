import type { Axis } from "./axes";
import type { FailedSpan } from "./failed-spans";

interface Props {
  readonly spans: readonly FailedSpan[];
  readonly x: Float64Array;
  readonly horizontal: Axis;
  readonly width: number;
}

/** Px between two crosses that can still be told apart. */
const APART = 9;

/** Where points failed, marked on a strip over the ruler: a cross a point, joined where they stand side by side. */
export function FailedStrip({ spans, x, horizontal, width }: Props) {
  const { from, to } = horizontal.range;
  const across = (place: number) => (width * (place - from)) / (to - from);
  const inside = (place: number) => across(Math.min(to, Math.max(from, place)));
  const crosses: string[] = [];
  let joined = "";
  let before = Number.NEGATIVE_INFINITY;
  for (const { first, last } of spans) {
    joined += `M${inside(x[first]!).toFixed(1)} 8H${inside(x[last]!).toFixed(1)}`;
    for (let place = first; place <= last; place++) {
      if (x[place]! < from || x[place]! > to) continue;
      const at = across(x[place]!);
      if (at - before < APART && place !== last) continue;
      crosses.push(`M${(at - 3).toFixed(1)} 5l6 6m0 -6l-6 6`);
      before = at;
    }
  }
  return (
    <div className="relative h-4" style={{ width }} aria-hidden="true">
      <span className="absolute right-full mr-3 text-broken text-xs leading-4">failed</span>
      <svg
        aria-hidden="true"
        width={width}
        height="16"
        stroke="var(--broken)"
        fill="none"
        className="overflow-visible"
      >
        <path d={joined} strokeOpacity="0.55" />
        <path d={crosses.join("")} strokeWidth="1.5" />
      </svg>
    </div>
  );
}
