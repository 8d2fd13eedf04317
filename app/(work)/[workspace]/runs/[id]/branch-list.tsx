import { formatKnob, formatValue } from "@/app/_components/curves/figures-in-words";
import { counted, formatCount } from "@/app/_components/ui/count";
import { StateMark } from "@/app/_components/ui/state-mark";
import { ProgressLine } from "@/app/_components/ui/states";
import { Cell, HeadCell, Table, TableFrame } from "@/app/_components/ui/table";
import type { BranchesDocument } from "@/lib/analyses/branches-document";
import type { AxisDocument } from "@/lib/analyses/result";
import { formatQuantity } from "@/lib/units/quantity";

interface Props {
  readonly branches: readonly BranchesDocument[];
  readonly axes: readonly AxisDocument[];
  /** How far the search is; null where the text asks for one operating point. */
  readonly search: { readonly rows: number; readonly rowsDone: number } | null;
}

/** Rows of the outer sweeps that are listed. */
const LISTED = 12;

/** Every operating point found, as branches over the sweep: where each goes, whether the circuit stays on it, and where it turns back. */
export function BranchList({ branches, axes, search }: Props) {
  const [axis] = axes;
  if (search === null && branches.length === 0) return null;
  const seeking = search !== null && search.rowsDone < search.rows;
  return (
    <section aria-labelledby="branches" data-branches={branches.length}>
      <h2 id="branches" className="caption">
        Operating points
      </h2>
      {seeking && (
        <div className="mt-2 grid gap-2" role="status">
          <p className="text-quiet text-sm">
            Still being sought: {formatCount(search.rowsDone)} of {counted(search.rows, "setting")} searched.
          </p>
          <ProgressLine done={search.rowsDone} total={search.rows} label="Settings searched" />
        </div>
      )}
      {branches.slice(0, LISTED).map((row) => (
        <Row key={row.at.map(({ value }) => value).join(" ")} row={row} axis={axis} axes={axes} />
      ))}
      {branches.length > LISTED && (
        <p className="mt-2 text-quiet text-xs">
          {formatCount(branches.length - LISTED)} more settings stand in the run document.
        </p>
      )}
    </section>
  );
}

function Row({
  row,
  axis,
  axes,
}: {
  readonly row: Props["branches"][number];
  readonly axis: AxisDocument | undefined;
  readonly axes: readonly AxisDocument[];
}) {
  const at = row.at
    .map(({ knob, value }) => {
      const own = axes.find((one) => one.knob === knob);
      return own === undefined ? "" : `${knob} ${formatKnob(own, value, 4)}`;
    })
    .join(", ");
  return (
    <div className="mt-2">
      {at !== "" && <h3 className="figures text-xs">{at}</h3>}
      <p className="flex items-baseline gap-1.5 text-sm">
        <span className={row.complete ? "text-holds" : "text-nodata"}>
          <StateMark shape={row.complete ? "check" : "diamond"} />
        </span>
        <span>
          {row.fault ??
            `${row.branches.length === 1 ? "1 branch" : `${formatCount(row.branches.length)} branches`}; ${
              row.complete
                ? "their indices add up at every value, so none is known to be missing."
                : "their indices do not add up, so an operating point is missing."
            }`}
        </span>
      </p>
      {row.branches.length > 0 && (
        <TableFrame label={`Branches ${at}`} className="mt-1">
          <Table>
            <caption className="sr-only">Branches {at}</caption>
            <thead>
              <tr>
                <HeadCell>Branch</HeadCell>
                <HeadCell>Reaches over {axis?.knob ?? "the point"}</HeadCell>
                <HeadCell>Stability</HeadCell>
                <HeadCell figure>Proved within</HeadCell>
              </tr>
            </thead>
            <tbody>
              {row.branches.map((branch, index) => (
                // biome-ignore lint/suspicious/noArrayIndexKey: branches have no name but their number
                <tr key={index}>
                  <Cell figure className="w-10 text-left!">
                    {index + 1}
                  </Cell>
                  <Cell className="figures text-xs">{reach(branch, axis)}</Cell>
                  <Cell>{stability(branch.stable)}</Cell>
                  <Cell figure>{proof(branch)}</Cell>
                </tr>
              ))}
            </tbody>
          </Table>
        </TableFrame>
      )}
      {row.folds.length > 0 && axis !== undefined && (
        <p className="mt-1 text-sm">
          {counted(row.folds.length, "fold")}, where branches turn back:{" "}
          {row.folds.map(({ value, traces }, index) => (
            // biome-ignore lint/suspicious/noArrayIndexKey: folds have no name but their place
            <span key={index} className="figures">
              {index > 0 && "; "}
              {axis.knob} {formatKnob(axis, value, 6)}
              {traces.length > 0 && row.branches[0]?.traces[0] !== undefined && (
                <span className="text-quiet">
                  {" "}
                  ({row.branches[0].traces[0].name}{" "}
                  {formatValue(traces[0] ?? null, row.branches[0].traces[0].unit)})
                </span>
              )}
            </span>
          ))}
        </p>
      )}
    </div>
  );
}

type Branch = BranchesDocument["branches"][number];

function reach({ stable }: Branch, axis: AxisDocument | undefined): string {
  if (axis === undefined) return "the one point";
  const there = stable.flatMap((one, i) => (one === null ? [] : [axis.values[i]!]));
  if (there.length === 0) return "nowhere";
  const least = there.reduce((a, b) => Math.min(a, b));
  const most = there.reduce((a, b) => Math.max(a, b));
  return `${formatKnob(axis, least, 4)} to ${formatKnob(axis, most, 4)}, ${counted(there.length, "point")}`;
}

function stability(stable: Branch["stable"]): string {
  const known = stable.filter((one) => one !== null);
  if (known.length === 0) return "not known";
  const held = known.filter(Boolean).length;
  if (held === known.length) return "stable: the circuit stays there";
  return held === 0
    ? "unstable: the circuit leaves it"
    : `stable at ${formatCount(held)} of ${counted(known.length, "point")}`;
}

function proof({ stable, bound }: Branch): string {
  const there = bound.filter((_, i) => stable[i] !== null);
  const proved = there.filter((one) => one !== null);
  if (proved.length === 0) return "not proved";
  const most = formatQuantity(
    proved.reduce((a, b) => Math.max(a, b)),
    "V",
    2,
  );
  return proved.length === there.length
    ? most
    : `${most}, ${formatCount(there.length - proved.length)} not proved`;
}
