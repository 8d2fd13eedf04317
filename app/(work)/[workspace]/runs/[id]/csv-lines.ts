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
    headed("bound", "V"),
  ];
  return `${heads.map(quoted).join(",")}\r\n`;
}

/**
 * A line a point of `block`. Values are in coherent SI units with every digit they have; an unsolved value is empty, and so is
 * the bound of a point without a proof. Draw 0 is the nominal design.
 */
export function csvLines(
  { axes, draws, points }: Planned,
  { from, traces, outcome, bound }: PointBlock,
): string {
  const ofOneDraw = points / (draws + 1);
  let lines = "";
  for (let i = 0; i < outcome.length; i++) {
    const k = from + i;
    const setting = settingOf(axes, k).map(({ value }) => value);
    const values = traces.map((column) => written(column[i]));
    lines += `${[k, ...(draws > 0 ? [Math.floor(k / ofOneDraw)] : []), ...setting, ...values, outcome[i] ?? "not solved", written(bound[i])].join(",")}\r\n`;
  }
  return lines;
}

function written(value: number | undefined): number | string {
  return value !== undefined && Number.isFinite(value) ? value : "";
}

function headed(name: string, unit: string): string {
  return unit === "1" ? name : `${name} [${unit}]`;
}

/** Quoted where a comma, a quotation mark or a line end stands in it; never taken for a formula by a table program. */
function quoted(text: string): string {
  const plain = /^[=+\-@]/.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(plain) ? `"${plain.replaceAll('"', '""')}"` : plain;
}
