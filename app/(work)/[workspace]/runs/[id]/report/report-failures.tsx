import { settingOf } from "@/app/_components/curves/curve-set";
import { reasonOf } from "@/app/_components/curves/failed-reasons";
import { formatKnob } from "@/app/_components/curves/figures-in-words";
import { counted } from "@/app/_components/ui/count";
import { Cell, HeadCell, Table, TableFrame } from "@/app/_components/ui/table";
import type { AxisDocument, Failure } from "@/lib/analyses/result";

/** Failed points that are printed. */
const LISTED = 20;

/** The points that have no solution, where they are and why. */
export function ReportFailures({
  failures,
  axes,
}: {
  readonly failures: readonly Failure[];
  readonly axes: readonly AxisDocument[];
}) {
  if (failures.length === 0) return null;
  const rest = failures.length - LISTED;
  return (
    <section aria-labelledby="report-failures" className="grid grid-cols-[minmax(0,1fr)] gap-3">
      <h2 id="report-failures">Failed points</h2>
      <TableFrame label="Points that failed">
        <Table>
          <caption>
            {counted(failures.length, "point")} failed{rest > 0 && `; the first ${LISTED} of them`}
          </caption>
          <thead>
            <tr>
              <HeadCell figure>Point</HeadCell>
              <HeadCell>Setting</HeadCell>
              <HeadCell>Reason</HeadCell>
            </tr>
          </thead>
          <tbody>
            {failures.slice(0, LISTED).map(({ point, outcome }) => (
              <tr key={point}>
                <Cell figure>{point}</Cell>
                <Cell>
                  {settingOf(axes, point)
                    .map(({ axis, value }) => `${axis.knob} ${formatKnob(axis, value, 4)}`)
                    .join(", ")}
                </Cell>
                <Cell>{reasonOf({ failures }, point, outcome)}</Cell>
              </tr>
            ))}
          </tbody>
        </Table>
      </TableFrame>
    </section>
  );
}
