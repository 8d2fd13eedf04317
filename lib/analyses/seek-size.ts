import type { Diagnostic } from "@/lib/language/diagnostic";
import { count, MOST_SOUGHT_POINTS, MOST_SOUGHT_SWEEPS, MOST_SOUGHT_UNKNOWNS } from "@/lib/language/limits";
import { type Plan, rowLength, soughtRows } from "./plan";

/** The statement in a text that its tokens were read from: it stands at the beginning of a line. */
const STATEMENT = /^[^\S\n]*(seek\b[^\n#]*)/m;

/** Whether a search for several operating points stays within what a worker does in minutes; one diagnostic where it does not. */
export function checkSeek(plan: Plan, text: string): Diagnostic[] {
  const sweeps = soughtRows(plan);
  if (sweeps === 0) return [];
  const message = tooMuch(plan, sweeps);
  if (message === null) return [];
  const found = STATEMENT.exec(text);
  const from = found === null ? 0 : found.index + found[0].length - found[1]!.length;
  const to = found === null ? 0 : from + found[1]!.trimEnd().length;
  return [{ code: "CAP10", severity: "error", from, to, message }];
}

function tooMuch(plan: Plan, sweeps: number): string | null {
  const { unknowns, axes } = plan;
  if (unknowns.length > MOST_SOUGHT_UNKNOWNS) {
    return `The circuit has ${count(unknowns.length)} unknowns (net voltages and branch currents), and several operating points can be sought with ${count(MOST_SOUGHT_UNKNOWNS)} at most; take \`seek\` out or make the circuit smaller.`;
  }
  if (sweeps > MOST_SOUGHT_SWEEPS) {
    return `Several operating points would be sought in ${count(sweeps)} sweeps of \`${axes[0]!.knob}\`, one for each setting of the other sweeps, and ${count(MOST_SOUGHT_SWEEPS)} is the most; give the other sweeps fewer values.`;
  }
  const points = sweeps * rowLength(plan);
  if (points <= MOST_SOUGHT_POINTS) return null;
  return `Several operating points would be sought at ${count(points)} points, and ${count(MOST_SOUGHT_POINTS)} is the most; sweep fewer points.`;
}
