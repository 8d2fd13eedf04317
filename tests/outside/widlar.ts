import { CLOSED_FORM, type Expected, lines, type OutsideCase } from "./case";
import { IDEAL, record, solved, temperature, transistor } from "./textbook";

/** Two junctions at the two currents: the resistor is the difference of their voltages over the smaller current. */
function design(id: string, more: readonly Expected[] = []): OutsideCase {
  const one = record(id);
  return {
    id,
    source: one.source,
    text: lines(
      `title "${id}: design of a small current"`,
      temperature(one),
      IDEAL,
      `ground -- I1 : current ${one.params.I1} A -- a`,
      `ground -- I2 : current ${one.params.I2} A -- b`,
      "Q1 : ideal { c = a, b = a, e = ground }",
      "Q2 : ideal { c = b, b = b, e = ground }",
      `show R = (a.v - b.v) / (${one.params.I2} A)`,
    ),
    expected: [{ trace: "R", value: solved(one, "R"), relative: CLOSED_FORM }, ...more],
  };
}

/** A resistor in the emitter of the second transistor makes its current small. */
function source(id: string): OutsideCase {
  const one = record(id);
  return {
    id,
    source: one.source,
    text: lines(
      `title "${id}: small current at another temperature"`,
      temperature(one),
      IDEAL,
      `ground -- I1 : current ${one.params.I1} A -- a`,
      "ground -- VO : voltage 5 V -- out",
      "Q1 : ideal { c = a, b = a, e = ground }",
      "Q2 : ideal { c = out, b = a, e = r }",
      `r -- R1 : resistor ${one.params.R} Ω -- ground`,
      "show R1.i, r.v",
    ),
    expected: [
      { trace: "R1.i", value: solved(one, "I2"), relative: CLOSED_FORM },
      { trace: "r.v", value: solved(one, "vr"), relative: CLOSED_FORM },
      // The published 5.7 µA, half a unit of its last place (quesba.com P10.1).
      { trace: "R1.i", value: "5.7e-6", absolute: 0.05e-6 },
    ],
  };
}

/** A resistor from the supply sets the first current. */
function supplied(id: string, reference: string, resistor: string, model: string): string {
  const one = record(id);
  return lines(
    `title "${id}: small current from a supply"`,
    temperature(one),
    model,
    `ground -- VS : voltage ${one.params.VCC} V -- vcc -- R1 : resistor ${reference} Ω -- a`,
    `ground -- VO : voltage ${one.params.VOUT ?? one.params.VCC} V -- out`,
    "Q1 : array { c = a, b = a, e = ground }",
    "Q2 : array { c = out, b = a, e = r }",
    `r -- R2 : resistor ${resistor} Ω -- ground`,
    "show a.v, r.v, R1.i, Q2.c.i",
  );
}

function full(): OutsideCase {
  const one = record("TB02e");
  return {
    id: "TB02e",
    source: one.source,
    text: supplied("TB02e", one.params.RREF!, one.params.RE!, transistor("array", one)),
    expected: [
      { trace: "a.v", value: solved(one, "a"), relative: CLOSED_FORM },
      { trace: "r.v", value: solved(one, "e2"), relative: CLOSED_FORM },
      { trace: "R1.i", value: solved(one, "IREF"), relative: CLOSED_FORM },
      { trace: "Q2.c.i", value: solved(one, "IOUT"), relative: CLOSED_FORM },
    ],
  };
}

/** The record leaves the −1 of the first junction out; with Is = 1e-15 A that moves the currents by less than 3e-13 of them. */
function ideal(): OutsideCase {
  const one = record("TB02f");
  const model = `model array : npn { Is = ${one.params.Is} A }`;
  return {
    id: "TB02f",
    source: one.source,
    text: supplied("TB02f", one.params.R1!, one.params.RE!, model),
    expected: [
      { trace: "a.v", value: solved(one, "a"), relative: CLOSED_FORM },
      { trace: "R1.i", value: solved(one, "IIN"), relative: CLOSED_FORM },
      { trace: "Q2.c.i", value: solved(one, "IOUT"), relative: CLOSED_FORM },
    ],
  };
}

/** Widlar 1965 (from memory); sources beside each record. The published 33 kΩ has two digits. */
export const WIDLAR: readonly OutsideCase[] = [
  design("TB02a"),
  design("TB02b", [{ trace: "R", value: "33e3", absolute: 0.5e3 }]),
  source("TB02c"),
  source("TB02d"),
  full(),
  ideal(),
];
