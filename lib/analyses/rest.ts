import { formatAxis, formatQuantity } from "@/lib/units/quantity";
import type { BranchesDocument } from "./branches-document";
import { readAll } from "./readings";
import { requireAll } from "./requirements";
import type { RequirementDocument, Verdict } from "./result";
import { type Columns, type Contract, Rows } from "./rows";
import { type OtherColumns, stableColumns } from "./stable-columns";
import { isTouched } from "./unstable";

const FLOOR = 1e-18;
const NOT_SOUGHT = "Judged at the operating points that the sweep follows; others are not looked for here.";

/**
 * Judges the requirements of a text that seeks several operating points: each must hold wherever the circuit may come to rest, which is at every
 * stable operating point found, not only at those that the sweep follows. `followed` is what they come to on the sweep alone; in its
 * place where that is not stable, a stable point is judged. A row in which nothing could be sought is "no data".
 */
export function judgeAtRest(
  contract: Contract,
  columns: Columns,
  followed: readonly RequirementDocument[],
): RequirementDocument[] {
  const { design, plan } = contract;
  const { branches } = columns;
  if (!branches) return followed.map((one) => ({ ...one, followed: onSweep(one), remark: NOT_SOUGHT }));
  const stable = stableColumns(plan, columns, branches);
  const judged = stable.unstable.length === 0 ? followed : requirementsOn(contract, stable.followed);
  const nominal = nominalOf(contract);
  const others = stable.others.map((set) => ({ set, documents: requirementsOn(nominal, set) }));
  const isShared = others.length > 0 && design.requirements.some(({ share }) => share !== null);
  const alone = isShared ? requirementsOn(nominal, stable.followed) : [];
  const rows = new Rows(nominal, stable.followed);
  return design.requirements.map(({ windows, share }, k) => {
    const found = others.map(({ set, documents }) => ({ set, document: documents[k]! }));
    // The nominal design may break what need hold in a share of the draws only; another branch counts where it is worse.
    const counting = share === null ? found : found.filter(({ document }) => isWorse(document, alone[k]!));
    return merged(followed[k]!, judged[k]!, counting, {
      branches,
      within: branches.filter((_, row) => rows.isWithin(row, windows)),
      isUnstable: isTouched(stable.unstable, windows, rows),
    });
  });
}

/** Whether a margin lies below another. */
function isWorse({ margin }: RequirementDocument, other: RequirementDocument): boolean {
  return margin !== null && (other.margin === null || margin < other.margin);
}

interface Circumstances {
  readonly branches: readonly (BranchesDocument | null)[];
  /** Those of the rows that the requirement looks at. */
  readonly within: readonly (BranchesDocument | null)[];
  readonly isUnstable: boolean;
}

function merged(
  followed: RequirementDocument,
  judged: RequirementDocument,
  others: readonly { readonly set: OtherColumns; readonly document: RequirementDocument }[],
  { branches, within, isUnstable }: Circumstances,
): RequirementDocument {
  const lowest = others
    .filter(({ document }) => document.margin !== null)
    .sort((a, b) => a.document.margin! - b.document.margin!)[0];
  const isAside = lowest !== undefined && isWorse(lowest.document, judged);
  const worse = isAside ? withWorst(judged, lowest.document, branchAt(lowest, branches)) : judged;
  const verdicts: Verdict[] = [judged.verdict, ...others.map(({ document }) => document.verdict)];
  if (within.some((row) => row === null || row.fault !== undefined)) verdicts.push("no data");
  const verdict = gravest(verdicts);
  const remark = [
    ...(verdict === "broken" && judged.verdict !== "broken" ? [aside(worse)] : []),
    ...(isUnstable ? [UNSTABLE] : []),
    ...unknown(within),
  ].join(" ");
  return { ...worse, verdict, followed: onSweep(followed), ...(remark === "" ? {} : { remark }) };
}

const UNSTABLE =
  "In places the sweep follows an operating point that is not stable; stable ones are judged there instead.";

function aside({ value, unit, worst }: RequirementDocument): string {
  const where = (worst?.at ?? []).map((one) => `${one.knob} = ${knobValue(one)}`);
  const what = value.worst === null ? "" : ` with ${formatQuantity(rounded(value.worst), unit)}`;
  return `Broken${what} at a stable operating point beside those that the sweep follows${where.length === 0 ? "" : `, at ${where.join(", ")}`}: the circuit may come to rest there.`;
}

/** Below the floor of the acceptance test there is nothing but rounding. */
function rounded(value: number): number {
  return Math.abs(value) < FLOOR ? 0 : value;
}

function knobValue({ knob, value, unit }: { knob: string; value: number; unit: string }): string {
  return knob === "temperature" ? formatAxis(value - 273.15, "°C") : formatAxis(value, unit);
}

function unknown(within: readonly (BranchesDocument | null)[]): string[] {
  const fault = within.find((row) => row?.fault !== undefined)?.fault;
  if (fault !== undefined) return [fault];
  if (within.includes(null)) return ["Its operating points are still being sought."];
  if (within.every((row) => row?.complete)) return [];
  return ["A further operating point may be missing: the indices of those found do not add up."];
}

/** What was judged, with a worse place of another branch; its limits there are shown, and the values of both. */
function withWorst(
  judged: RequirementDocument,
  other: RequirementDocument,
  branch: number | null,
): RequirementDocument {
  const isAlike = judged.allowed.low === other.allowed.low && judged.allowed.high === other.allowed.high;
  const ends = [judged.value.low, judged.value.high, other.value.low, other.value.high].filter(
    (value) => value !== null,
  );
  const value = isAlike
    ? {
        nominal: judged.value.nominal,
        worst: other.value.worst,
        low: ends.length === 0 ? null : Math.min(...ends),
        high: ends.length === 0 ? null : Math.max(...ends),
      }
    : other.value;
  const worst = other.worst === null ? null : { ...other.worst, ...(branch === null ? {} : { branch }) };
  return { ...judged, margin: other.margin, worst, allowed: other.allowed, value };
}

/** The branch on which a document's worst place lies, counted among those of its row. */
function branchAt(
  { set, document }: { readonly set: OtherColumns; readonly document: RequirementDocument },
  branches: readonly (BranchesDocument | null)[],
): number | null {
  const at = new Map((document.worst?.at ?? []).map(({ knob, value }) => [knob, value]));
  const row = branches.findIndex((one) => one?.at.every(({ knob, value }) => at.get(knob) === value));
  return set.branchOf[row] ?? null;
}

function requirementsOn(contract: Contract, columns: Columns): RequirementDocument[] {
  const rows = new Rows(contract, columns);
  readAll(contract, rows);
  return requireAll(contract, rows);
}

/** The same contract without draws: branches are looked for at nominal values. */
function nominalOf({ design, plan }: Contract): Contract {
  const requirements = design.requirements.map((one) => ({ ...one, share: null }));
  return {
    design: { ...design, draws: null, requirements },
    plan: { ...plan, draws: 0, points: plan.points / (plan.draws + 1) },
  };
}

function gravest(verdicts: readonly Verdict[]): Verdict {
  return verdicts.includes("broken") ? "broken" : verdicts.includes("no data") ? "no data" : "holds";
}

function onSweep({ verdict, margin }: RequirementDocument): NonNullable<RequirementDocument["followed"]> {
  return { verdict, margin };
}
