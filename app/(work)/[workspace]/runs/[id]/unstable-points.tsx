import { settingOf } from "@/app/_components/curves/curve-set";
import { formatKnob } from "@/app/_components/curves/figures-in-words";
import { counted, formatCount } from "@/app/_components/ui/count";
import { Notice } from "@/app/_components/ui/notice";
import type { AxisDocument } from "@/lib/analyses/result";

interface Props {
  /** Flat points [from, to). */
  readonly ranges: readonly { readonly from: number; readonly to: number }[];
  readonly axes: readonly AxisDocument[];
  /** Points of one draw. */
  readonly ofOneDraw: number;
}

/** Ranges that are spelt out. */
const LISTED = 4;

/** Points of the swept solution on which the circuit would not stay. */
export function UnstablePoints({ ranges, axes, ofOneDraw }: Props) {
  if (ranges.length === 0) return null;
  const count = ranges.reduce((sum, { from, to }) => sum + to - from, 0);
  const place = (point: number) =>
    settingOf(axes, point % ofOneDraw)
      .map(({ axis, value }) => `${axis.knob} ${formatKnob(axis, value, 4)}`)
      .join(", ");
  const words = ranges
    .slice(0, LISTED)
    .map(({ from, to }) => (to - from === 1 ? place(from) : `${place(from)} to ${place(to - 1)}`));
  return (
    <Notice tone="caution" title={`${counted(count, "unstable point")}`}>
      <p>
        Solved, but the circuit would leave {count === 1 ? "it" : "them"} for another operating point:{" "}
        <span className="figures text-xs">{words.join("; ")}</span>
        {ranges.length > LISTED && `, and ${formatCount(ranges.length - LISTED)} more ranges`}. Write a line
        such as <code>seek 3</code> to find where it goes.
      </p>
    </Notice>
  );
}
