import { allBudgets, type Budget } from "./budget";
import type { Job } from "./compile";
import { judge } from "./judge";
import { type PowerPeak, powerPeak } from "./power-peak";
import type { ReadingDocument, RequirementDocument, Verdict } from "./result";
import type { Columns } from "./rows";

/** What a finished run keeps of its judgement. */
export interface KeptJudgement {
  readonly verdict: Verdict | null;
  readonly requirements: readonly RequirementDocument[];
  /** Those that are one number a sweep; the others follow from the traces. */
  readonly readings: readonly ReadingDocument[];
  /** Error budgets of the readings; null where the run is too large for them. */
  readonly budgets: readonly Budget[] | null;
  /** Error budgets of what the requirements are about, where each is worst in the nominal design; likewise. */
  readonly causes: readonly Budget[] | null;
  /** The part that takes in most power; absent in a judgement made before this was kept. */
  readonly power?: PowerPeak | null;
}

/** Judges a finished run and works out the error budgets of its readings and requirements. Without requirements the verdict is null. */
export function finalJudgement(job: Job, columns: Columns): KeptJudgement {
  const { verdict, requirements, readings } = judge(job, columns);
  const numbers = readings.filter(({ per }) => per === "sweep");
  const all = allBudgets(job);
  const [budgets, causes] = [all?.readings ?? null, all?.requirements ?? null];
  return { verdict, requirements, readings: numbers, budgets, causes, power: powerPeak(job) };
}
