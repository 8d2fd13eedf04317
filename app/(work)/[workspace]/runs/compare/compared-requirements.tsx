import { MarginBar } from "@/app/_components/ui/margin-bar";
import { marginSentence, worstInWords } from "@/app/_components/ui/margin-words";
import { StateBadge } from "@/app/_components/ui/state-badge";
import { Cell, HeadCell, Table, TableFrame } from "@/app/_components/ui/table";
import type { RequirementDocument } from "@/lib/analyses/result";
import { formatQuantity } from "@/lib/units/quantity";
import { type ComparedRun, nameOf } from "./compare-shapes";
import { sideBySide } from "./side-by-side";

/** The requirements of all runs, by their labels: verdict, margin bar and margin of each. */
export function ComparedRequirements({ runs }: { readonly runs: readonly ComparedRun[] }) {
  const rows = sideBySide(runs.map(({ run }) => run.judgement?.requirements ?? []));
  if (rows.length === 0) return null;
  const verdicts = rows.map(({ each }) => each.flatMap((one) => one?.verdict ?? []));
  const turned = verdicts.filter((found) => new Set(found).size > 1).length;
  return (
    <section aria-labelledby="requirements">
      <h2 id="requirements" className="caption">
        Requirements
        {runs.length > 1 && (
          <span className="font-normal">
            ,{" "}
            {turned === 0
              ? "no verdict differs"
              : turned === 1
                ? "one verdict differs"
                : `${turned} verdicts differ`}
          </span>
        )}
      </h2>
      <TableFrame label="Requirements side by side" className="mt-1">
        <Table aria-labelledby="requirements">
          <thead>
            <tr>
              <HeadCell>Requirement</HeadCell>
              {runs.map((one) => (
                <HeadCell key={one.letter} className="min-w-44">
                  {nameOf(one, runs)}
                </HeadCell>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map(({ label, each }, index) => (
              // biome-ignore lint/suspicious/noArrayIndexKey: two may have one label; the order never changes
              <tr key={index}>
                <Cell className="min-w-32 break-words font-semibold">{label}</Cell>
                {each.map((one, k) => (
                  <Cell key={runs[k]!.letter}>
                    <Judged one={one} run={runs[k]!} />
                  </Cell>
                ))}
              </tr>
            ))}
          </tbody>
        </Table>
      </TableFrame>
    </section>
  );
}

function Judged({ one, run }: { readonly one: RequirementDocument | null; readonly run: ComparedRun }) {
  if (one === null) {
    return (
      <span className="text-quiet">
        {run.run.judgement === null ? "not judged yet" : "not required there"}
      </span>
    );
  }
  const { margin, unit } = one;
  // A judgement that was kept by an earlier engine has no limits.
  const known = one.allowed !== undefined && one.value !== undefined;
  return (
    <div>
      <span className="sr-only">{known ? marginSentence(one) : null}</span>
      <div aria-hidden={known} className="flex flex-wrap items-center gap-x-3">
        <span className="min-w-18">
          <StateBadge state={one.verdict} />
        </span>
        {known && <MarginBar requirement={one} decorative className="max-w-28 grow" />}
        <span className="figures text-xs">
          {known && one.value.worst !== null && `${worstInWords(one)}, `}
          <span className="text-quiet">
            {margin === null
              ? "no margin"
              : `${margin < 0 ? "missed by" : "margin"} ${formatQuantity(Math.abs(margin), unit, 3)}`}
          </span>
        </span>
      </div>
    </div>
  );
}
