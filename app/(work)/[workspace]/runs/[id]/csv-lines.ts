import { settingOf } from "@/app/_components/curves/curve-set";
import type { Plan } from "@/lib/analyses/plan";
import type { PointBlock } from "@/lib/services/runs/point-blocks";

type Planned = Pick<Plan, "axes" | "draws" | "points" | "traces">;

/** The head line of a run's points as comma-separated values (RFC 4180), the unit of each column in brackets. */
export function csvHead({ axes, draws, traces }: Planned): string {
  const heads = [
    "point",
    ...(draws > 0 ? ["draw"] : []),
    ...axes.map(({ knob, unit }) => headed(knob, unit)),
    ...traces.map(({ name, unit }) => headed(name, unit)),
    "outcome",
  ];
  return `${heads.map(quoted).join(",")}\r\n`;
}

/**
 * A line a point of `block`. Values are in coherent SI units with every digit they have; an unsolved value is empty. Draw 0 is
 * the nominal design.
 */
export function csvLines({ axes, draws, points }: Planned, { from, traces, outcome }: PointBlock): string {
  const ofOneDraw = points / (draws + 1);
  let lines = "";
  for (let i = 0; i < outcome.length; i++) {
    const k = from + i;
    const setting = settingOf(axes, k).map(({ value }) => value);
    const values = traces.map((column) => (Number.isFinite(column[i]) ? column[i] : ""));
    lines += `${[k, ...(draws > 0 ? [Math.floor(k / ofOneDraw)] : []), ...setting, ...values, outcome[i] ?? "not solved"].join(",")}\r\n`;
  }
  return lines;
}

function headed(name: string, unit: string): string {
  return unit === "1" ? name : `${name} [${unit}]`;
}

/** Quoted where a comma, a quotation mark or a line end stands in it; never taken for a formula by a table program. */
function quoted(text: string): string {
  const plain = /^[=+\-@]/.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(plain) ? `"${plain.replaceAll('"', '""')}"` : plain;
}
