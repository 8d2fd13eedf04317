import { type Circuit, numberUnknowns } from "@/lib/circuit/circuit";
import { checkWiring } from "@/lib/circuit/wiring";
import type { Design } from "@/lib/language/ast";
import { type CheckOptions, check } from "@/lib/language/checker";
import type { Diagnostic } from "@/lib/language/diagnostic";
import { type Plan, planOf } from "./plan";

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
  const all = [...diagnostics, ...checkWiring(design, text)].sort((a, b) => a.from - b.from || a.to - b.to);
  if (all.some(({ severity }) => severity === "error")) return { diagnostics: all, job: null };
  const circuit = numberUnknowns(design);
  return { diagnostics: all, job: { design, circuit, plan: planOf(design, circuit) } };
}
