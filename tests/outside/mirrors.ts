import { CLOSED_FORM, lines, type OutsideCase, type Reference } from "./case";
import { record, recordsOf, solved, temperature, transistor } from "./textbook";

/** A fed mirror and its output, with the transistors between them. */
function mirror(one: Reference, feed: string, transistors: readonly string[]): string {
  return lines(
    `title "${one.id}: mirror"`,
    temperature(one),
    transistor("array", one),
    feed,
    ...transistors,
    ...(one.params.VOUT === undefined ? [] : [`ground -- VO : voltage ${one.params.VOUT} V -- out`]),
    ...(one.params.VCC === undefined ? [] : [`ground -- VS : voltage ${one.params.VCC} V -- vcc`]),
    "show output = QO.c.i, a.v",
  );
}

const FED = (one: Reference) => `ground -- I1 : current ${one.params.IREF} A -- a`;

/** The output follows the input's voltage through an ideal amplifier, so that both collectors stand at one voltage. */
const BUFFERED: readonly string[] = [
  "model amp : opamp { }",
  "Q1 : array { c = a, b = a, e = ground }",
  "QO : array { c = o, b = a, e = ground }",
  "A1 : amp { plus = a, minus = o, out = o }",
];

const SIMPLE: readonly string[] = [
  "Q1 : array { c = a, b = a, e = ground }",
  "QO : array { c = out, b = a, e = ground }",
];

/** Wilson 1968 (from memory). */
const WILSON: readonly string[] = [
  "Q1 : array { c = a, b = b, e = ground }",
  "Q2 : array { c = b, b = b, e = ground }",
  "QO : array { c = out, b = a, e = b }",
];

const HELPED: readonly string[] = [
  "Q1 : array { c = a, b = b, e = ground }",
  "QO : array { c = out, b = b, e = ground }",
  "Q3 : array { c = vcc, b = a, e = b }",
];

function outputOf(one: Reference) {
  return [
    { trace: "output", value: solved(one, "IOUT"), relative: CLOSED_FORM },
    { trace: "a.v", value: solved(one, "a"), relative: CLOSED_FORM },
  ];
}

/** Mirrors by the law of Ebers and Moll 1954 (from memory); sources beside each record. */
export const MIRRORS: readonly OutsideCase[] = [
  ...[record("TB03a")].map((one) => ({
    id: one.id,
    source: one.source,
    text: mirror(one, FED(one), BUFFERED),
    expected: outputOf(one),
  })),
  ...["TB03b", "TB03c", "TB03d"].map(record).map((one) => ({
    id: one.id,
    source: one.source,
    text: mirror(one, `vcc -- R1 : resistor ${one.params.R} Ω -- a`, SIMPLE),
    expected: outputOf(one),
  })),
  ...recordsOf("TB04").map((one) => ({
    id: one.id,
    source: one.source,
    text: mirror(one, FED(one), WILSON),
    expected: outputOf(one),
  })),
  ...[record("TB05")].map((one) => ({
    id: one.id,
    source: one.source,
    text: mirror(one, FED(one), HELPED),
    expected: outputOf(one),
  })),
];
