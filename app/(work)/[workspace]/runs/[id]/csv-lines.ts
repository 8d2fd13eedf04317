import { settingOf } from "@/app/_components/curves/curve-set";
import type { RunDocument } from "@/lib/analyses/result";

/** Points in one piece of text. */
const PIECE = 1000;

/**
 * A run document as comma-separated values (RFC 4180), in pieces: a head line with the unit in brackets, then a line a point.
 * Values are in coherent SI units with every digit they have; an unsolved value is empty. Draw 0 is the nominal design.
 */
export function* csvLines(document: RunDocument): Generator<string, void> {
  const { axes, draws, traces, points } = document;
  const count = points.outcome.length;
  const ofOneDraw = count / (draws + 1);
  const heads = [
    "point",
    ...(draws > 0 ? ["draw"] : []),
    ...axes.map(({ knob, unit }) => headed(knob, unit)),
    ...traces.map(({ name, unit }) => headed(name, unit)),
    "outcome",
  ];
  yield `${heads.map(quoted).join(",")}\r\n`;
  for (let from = 0; from < count; from += PIECE) {
    let piece = "";
    for (let k = from; k < Math.min(count, from + PIECE); k++) {
      const setting = settingOf(axes, k).map(({ value }) => value);
      const values = traces.map(({ values: column }) => column[k] ?? "");
      piece += `${[k, ...(draws > 0 ? [Math.floor(k / ofOneDraw)] : []), ...setting, ...values, points.outcome[k] ?? "not solved"].join(",")}\r\n`;
    }
    yield piece;
  }
}

function headed(name: string, unit: string): string {
  return unit === "1" ? name : `${name} [${unit}]`;
}

/** Quoted where a comma, a quotation mark or a line end stands in it; never taken for a formula by a table program. */
function quoted(text: string): string {
  const plain = /^[=+\-@]/.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(plain) ? `"${plain.replaceAll('"', '""')}"` : plain;
}
