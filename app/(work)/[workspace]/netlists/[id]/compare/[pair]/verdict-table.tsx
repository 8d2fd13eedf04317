import { StateBadge } from "@/app/_components/ui/state-badge";
import { Cell, HeadCell, Table, TableFrame } from "@/app/_components/ui/table";
import type { RequirementDocument } from "@/lib/analyses/result";
import { formatQuantity } from "@/lib/units/quantity";
import type { ComparedRun } from "./compare-shapes";
import { turnsInWords, type VerdictChange, verdictChanges } from "./verdict-changes";

const TURNS: Record<VerdictChange["turn"], string> = {
  worse: "worse",
  better: "better",
  new: "new",
  gone: "gone",
  same: "as before",
};

/** Requirement by requirement: the verdict and the margin before and after. */
export function VerdictTable({
  before,
  after,
  labels,
}: {
  readonly before: ComparedRun;
  readonly after: ComparedRun;
  readonly labels: readonly [before: string, after: string];
}) {
  const rows = verdictChanges(before.requirements, after.requirements);
  if (rows.length === 0)
    return <p className="border-y py-3 text-quiet text-sm">Neither revision requires anything.</p>;
  return (
    <>
      <p className="mb-1 text-sm">{turnsInWords(rows)}</p>
      <TableFrame label="Verdicts" className="relative">
        <Table>
          <caption className="sr-only">Verdicts of both revisions</caption>
          <thead>
            <tr>
              <HeadCell>Requirement</HeadCell>
              <HeadCell>{labels[0]}</HeadCell>
              <HeadCell>{labels[1]}</HeadCell>
              <HeadCell>Turn</HeadCell>
            </tr>
          </thead>
          <tbody>
            {rows.map((row, index) => (
              // biome-ignore lint/suspicious/noArrayIndexKey: two may have one label; the order never changes
              <tr key={index}>
                <Cell className="min-w-32 break-words">{row.label}</Cell>
                <Cell>
                  <Judged one={row.before} />
                </Cell>
                <Cell>
                  <Judged one={row.after} />
                </Cell>
                <Cell className={INKS[row.turn]}>{TURNS[row.turn]}</Cell>
              </tr>
            ))}
          </tbody>
        </Table>
      </TableFrame>
    </>
  );
}

const INKS: Record<VerdictChange["turn"], string> = {
  worse: "font-semibold text-broken",
  better: "font-semibold text-holds",
  new: "",
  gone: "",
  same: "text-quiet",
};

function Judged({ one }: { readonly one: RequirementDocument | null }) {
  if (one === null) return <span className="text-quiet">not required</span>;
  return (
    <>
      <StateBadge state={one.verdict} />
      {one.margin !== null && (
        <span className="figures block text-quiet text-xs">
          {one.margin < 0 ? "missed by" : "margin"} {formatQuantity(Math.abs(one.margin), one.unit)}
        </span>
      )}
    </>
  );
}
