import { type Circuit, numberUnknowns } from "@/lib/circuit/circuit";
import { checkWiring } from "@/lib/circuit/wiring";
import type { Design } from "@/lib/language/ast";
import { type CheckOptions, check } from "@/lib/language/checker";
import type { Diagnostic } from "@/lib/language/diagnostic";
import { type Plan, planOf } from "./plan";
import { checkSeek } from "./seek-size";

/** A netlist ready to be solved. */
export interface Job {
  readonly design: Design;
  readonly circuit: Circuit;
  readonly plan: Plan;
}

/**
 * Checks a text whole (form, names, units, sizes, wiring) and plans its run. `job` is null exactly where a diagnostic is an
 * error. Diagnostics are sorted by place. Never throws.
 */
export function compile(
  text: string,
  options: CheckOptions = {},
): { diagnostics: readonly Diagnostic[]; job: Job | null } {
  const { design, diagnostics } = check(text, options);
  if (design === null) return { diagnostics, job: null };
  const all = [...diagnostics, ...checkWiring(design, text)].sort(byPlace);
  if (all.some(({ severity }) => severity === "error")) return { diagnostics: all, job: null };
  const circuit = numberUnknowns(design);
  const plan = planOf(design, circuit);
  const tooMuch = checkSeek(plan, text);
  if (tooMuch.length > 0) return { diagnostics: [...all, ...tooMuch].sort(byPlace), job: null };
  return { diagnostics: all, job: { design, circuit, plan } };
}

function byPlace(a: Diagnostic, b: Diagnostic): number {
  return a.from - b.from || a.to - b.to;
}
