import { readAll } from "./readings";
import { requireAll } from "./requirements";
import { judgeAtRest } from "./rest";
import type { ReadingDocument, RequirementDocument, Verdict } from "./result";
import { type Columns, type Contract, Rows } from "./rows";
import { remarkUnstable } from "./unstable";

/** What a contract came to. */
export interface Judgement {
  readonly readings: readonly ReadingDocument[];
  readonly requirements: readonly RequirementDocument[];
  /** "broken" where one requirement is; else "no data" where one is; null without requirements. */
  readonly verdict: Verdict | null;
}

/**
 * Judges the contract of a netlist on the columns of a run, in whatever order and shards they came. A requirement that needs a point
 * that is not solved is never held: it is "no data", or "broken" where another point breaks it. Pure; the service, the
 * command line and the preview share it.
 */
export function judge(contract: Contract, columns: Columns): Judgement {
  const rows = new Rows(contract, columns);
  const readings = readAll(contract, rows);
  const followed = requireAll(contract, rows);
  const isSeeking = contract.plan.seek !== undefined;
  const requirements = isSeeking
    ? judgeAtRest(contract, columns, followed)
    : remarkUnstable(contract, rows, columns.unstable ?? [], followed);
  return { readings, requirements, verdict: worstOf(requirements) };
}

function worstOf(requirements: readonly RequirementDocument[]): Verdict | null {
  const verdicts = requirements.map(({ verdict }) => verdict);
  if (verdicts.length === 0) return null;
  return verdicts.includes("broken") ? "broken" : verdicts.includes("no data") ? "no data" : "holds";
}
