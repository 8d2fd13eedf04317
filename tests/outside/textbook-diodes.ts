import { CLOSED_FORM, lines, type OutsideCase } from "./case";
import { record, recordsOf, solved } from "./textbook";

/** The thermal voltage and saturation current of each record, in the words of the language. */
const GIVEN: Readonly<Record<string, readonly [thermal: string, Is: string]>> = {
  TB01a: ["0.025 V", "1 mA / (exp(0.7 V / V_T) - 1)"],
  TB01b: ["0.1 V / ln(10)", "1 mA / (exp(0.7 V / V_T) - 1)"],
  TB01f: ["0.06 V / ln(10)", "1 mA / (exp(0.7 V / V_T) - 1)"],
  TB01c: ["300 K * k_B / q_e", "1 mA / (exp(0.7 V / V_T) - 1)"],
  TB01d: ["0.025 V", "1e-15 A"],
  TB01e: ["0.0258 V", "6e-15 A"],
};

function text(id: string): string {
  const { params } = record(id);
  const [thermal, Is] = GIVEN[id]!;
  return lines(
    `title "${id}: diode and resistor of a textbook"`,
    `knob temperature = ${thermal} * q_e / k_B`,
    `model junction : diode { Is = ${Is} }`,
    `ground -- V1 : voltage ${params.V} V -- in -- R1 : resistor ${params.R} Ω -- d -- D1 : diode junction -- ground`,
    "show D1.i, d.v",
  );
}

/** Diode and resistor as the textbooks named in each record solve them; the exact values are by Lambert W. */
export const TEXTBOOK_DIODES: readonly OutsideCase[] = [
  ...recordsOf("TB01").map((one) => ({
    id: one.id,
    source: one.source,
    text: text(one.id),
    expected: [
      { trace: "D1.i", value: solved(one, "I"), relative: CLOSED_FORM },
      { trace: "d.v", value: solved(one, "vd"), absolute: 1e-14 },
    ],
  })),
  {
    id: "TB01f",
    source: "the published digits, half a unit of the last place: 4.262 mA and 0.738 V (from memory)",
    text: text("TB01f"),
    expected: [
      { trace: "D1.i", value: "4.262e-3", absolute: 0.5e-6 },
      { trace: "d.v", value: "0.738", absolute: 0.5e-3 },
    ],
  },
];
