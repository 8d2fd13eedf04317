import { settingOf } from "@/app/_components/curves/curve-set";
import { formatKnob } from "@/app/_components/curves/figures-in-words";
import { Button } from "@/app/_components/ui/button";
import { counted, formatCount } from "@/app/_components/ui/count";
import { outcomeInWords, reasonOf } from "@/lib/analyses/reasons";
import type { AxisDocument, Failure } from "@/lib/analyses/result";

interface Props {
  readonly failures: readonly Failure[];
  readonly axes: readonly AxisDocument[];
  readonly draws: number;
  /** Points of one draw. */
  readonly ofOneDraw: number;
  readonly onPoint: (point: number) => void;
  readonly onAll: () => void;
}

/** Failures listed one by one under each reason. */
const LISTED = 5;

/** Points without a value, by the reason and what would not settle, each with its place. */
export function FailedPoints({ failures, axes, draws, ofOneDraw, onPoint, onAll }: Props) {
  if (failures.length === 0) return null;
  const groups = new Map<string, Failure[]>();
  for (const one of failures) {
    const key = `${one.outcome} ${one.unsettled.join(" ")}`;
    const group = groups.get(key);
    if (group === undefined) groups.set(key, [one]);
    else group.push(one);
  }
  const shown = [...groups.values()].sort((a, b) => b.length - a.length);
  const place = (point: number) => {
    const at = settingOf(axes, point % ofOneDraw).map(
      ({ axis, value }) => `${axis.knob} ${formatKnob(axis, value, 4)}`,
    );
    const draw = Math.floor(point / ofOneDraw);
    return [...at, ...(draws > 0 && draw > 0 ? [`draw ${draw}`] : [])].join(", ") || `point ${point}`;
  };
  return (
    <section aria-labelledby="failed-points">
      <h2 id="failed-points" className="caption">
        {counted(failures.length, "failed point")}
      </h2>
      <ul className="mt-2 border-t">
        {shown.slice(0, LISTED).map((group) => {
          const [first] = group;
          return (
            <li
              key={`${first!.outcome} ${first!.unsettled.join(" ")}`}
              className="grid gap-1 border-b py-2.5 text-sm"
            >
              <p>
                <span className="font-semibold text-broken">
                  {formatCount(group.length)} {outcomeInWords(first!.outcome)}.
                </span>{" "}
                <span className="text-quiet">{reasonOf(first!.outcome, first!.unsettled)}</span>
              </p>
              <p className="flex flex-wrap gap-x-2 text-quiet text-xs">
                {group.slice(0, LISTED).map(({ point }) => (
                  <Button
                    key={point}
                    size="small"
                    tone="quiet"
                    className="figures min-h-6! whitespace-normal! px-1! text-left font-normal! text-xs underline decoration-edge underline-offset-3"
                    onClick={() => onPoint(point)}
                  >
                    {place(point)}
                  </Button>
                ))}
                {group.length > LISTED && <span>and {formatCount(group.length - LISTED)} more</span>}
              </p>
            </li>
          );
        })}
      </ul>
      <p className="mt-2 text-quiet text-xs">
        {shown.length > LISTED && `${formatCount(shown.length - LISTED)} more groups. `}
        <Button size="small" tone="quiet" className="-ml-2" onClick={onAll}>
          All failed points in the table
        </Button>
      </p>
    </section>
  );
}
