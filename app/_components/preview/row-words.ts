import { formatKnob, isAmbient } from "@/app/_components/curves/figures-in-words";
import { counted, formatCount } from "@/app/_components/ui/count";
import type { Yield } from "@/lib/analyses/yield";
import { OUTCOMES } from "@/lib/solver/outcome";
import { formatQuantity } from "@/lib/units/quantity";
import type { Row, TooLarge } from "./messages";

const SOLVED = OUTCOMES.indexOf("converged");

/** How many points of a row are solved, proved and failed, and the widest proof, V; null without one. */
export interface RowCount {
  readonly points: number;
  readonly failed: number;
  readonly proved: number;
  readonly worst: number | null;
}

export function countRow({ outcome, bound }: Pick<Row, "outcome" | "bound">): RowCount {
  let failed = 0;
  let proved = 0;
  let worst = 0;
  for (let k = 0; k < outcome.length; k++) {
    if (outcome[k] !== SOLVED) failed += 1;
    else if (Number.isFinite(bound[k])) {
      proved += 1;
      worst = Math.max(worst, bound[k]!);
    }
  }
  return { points: outcome.length, failed, proved, worst: proved === 0 ? null : worst };
}

/** "all points proved, worst 9 pV", or how many are not, or failed. */
export function proofInWords(row: Row): string {
  const { points, failed, proved, worst } = countRow(row);
  const failures = failed === 0 ? [] : [`${formatCount(failed)} of ${counted(points, "point")} failed`];
  if (row.stage !== "whole") return [...failures, "proofs to come"].join(", ");
  const left = points - failed - proved;
  const width = worst === null ? [] : [`worst ${formatQuantity(worst, "V", 2)}`];
  if (left === 0 && failed === 0) return ["all points proved", ...width].join(", ");
  if (left === 0) return [...failures, ...(proved === 0 ? [] : ["all others proved", ...width])].join(", ");
  return [...failures, `${formatCount(left)} not proved`, ...width].join(", ");
}

/** "187 of 200 draws hold". */
export function yieldInWords({ holds, of }: Yield): string {
  return `${formatCount(holds)} of ${counted(of, "draw")} ${holds === 1 ? "holds" : "hold"}`;
}

/** The setting at which a row stands, the temperature last: "V_y 1 V, 25 °C". */
export function settingInWords({ axes, temperature }: Row): string {
  const outer = axes.slice(1).filter((axis) => !isAmbient(axis));
  const ambient = { knob: "temperature", unit: "K" };
  const swept = axes[0] !== undefined && isAmbient(axes[0]);
  const words = outer.map((axis) => `${axis.knob} ${formatKnob(axis, axis.values[0]!, 4)}`);
  return [...words, ...(swept ? [] : [formatKnob(ambient, temperature, 6)])].join(", ");
}

/** "121 points at 25 °C, nominal". */
export function countInWords(row: Row): string {
  const solved = row.axes[0]?.values.length ?? 1;
  const count =
    row.stage === "coarse"
      ? `${formatCount(solved)} of ${counted(row.length, "point")}`
      : counted(solved, "point");
  const setting = settingInWords(row);
  return `${count}${setting === "" ? "" : ` at ${setting}`}, nominal`;
}

/** "121 points at 25 °C, nominal · solved here in 1.9 ms, not stored". */
export function rowInWords(row: Row): string {
  const time = `${Number(row.taken.toPrecision(row.taken < 10 ? 2 : 3))}\u202fms`;
  return `${countInWords(row)} · solved here in ${time}, not stored`;
}

/** Why a sweep is not shown whole, and what to do. */
export function tooLargeInWords({ points, pace }: TooLarge): string {
  const seconds = (points * pace) / 1000;
  const long = seconds >= 10 ? `, about ${formatCount(Math.round(seconds))} s here` : "";
  return `The first sweep has ${counted(points, "point")}${long}, more than the preview waits for. Queue a run for all of them, or sweep fewer points.`;
}
