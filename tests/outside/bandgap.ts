import { CLOSED_FORM, lines, type OutsideCase, type Reference } from "./case";
import { IDEAL, record, solved, temperature, transistor } from "./textbook";

/** Names such as uV_per_K_N8 and mV_300K_N8: the ratio of the currents in two equal junctions. */
function proportional(one: Reference): readonly OutsideCase[] {
  return one.solutions!.flatMap(({ outputs }) =>
    Object.entries(outputs ?? {}).map(([name, value]) => {
      const ratio = /N(\d+)$/u.exec(name)![1]!;
      const [shown, unit] = name.startsWith("uV_per_K")
        ? ["(a.v - b.v) / temperature", 1e-6]
        : ["a.v - b.v", 1e-3];
      return {
        id: one.id,
        source: one.source,
        text: lines(
          `title "${one.id}: ${name}"`,
          "knob temperature = 300 K",
          IDEAL,
          `ground -- I1 : current ${ratio} * 10 µA -- a`,
          "ground -- I2 : current 10 µA -- b",
          "Q1 : ideal { c = a, b = a, e = ground }",
          "Q2 : ideal { c = b, b = b, e = ground }",
          `show difference = ${shown}`,
        ),
        expected: [{ trace: "difference", value: Number(value) * unit, relative: CLOSED_FORM }],
      };
    }),
  );
}

function areas(one: Reference): OutsideCase {
  const { I, AR } = one.params;
  return {
    id: one.id,
    source: one.source,
    text: lines(
      `title "${one.id}: two areas"`,
      temperature(one),
      transistor("one", one),
      transistor("many", one, AR),
      `ground -- I1 : current ${I} A -- a`,
      `ground -- I2 : current ${I} A -- b`,
      "Q1 : one { c = a, b = a, e = ground }",
      "Q2 : many { c = b, b = b, e = ground }",
      "show a.v, b.v, difference = a.v - b.v",
    ),
    expected: [
      { trace: "a.v", value: solved(one, "v1"), relative: CLOSED_FORM },
      { trace: "b.v", value: solved(one, "v2"), relative: CLOSED_FORM },
      { trace: "difference", value: solved(one, "dV"), relative: CLOSED_FORM },
    ],
  };
}

function cell(one: Reference): OutsideCase {
  const { VCC, RC, R1, R2, AR } = one.params;
  return {
    id: one.id,
    source: one.source,
    text: lines(
      `title "${one.id}: bandgap cell"`,
      temperature(one),
      transistor("one", one),
      transistor("many", one, AR),
      "model amp : opamp { }",
      `ground -- VS : voltage ${VCC} V -- vcc`,
      `vcc -- RC1 : resistor ${RC} Ω -- c1`,
      `vcc -- RC2 : resistor ${RC} Ω -- c2`,
      "A1 : amp { plus = c1, minus = c2, out = b }",
      "Q1 : many { c = c1, b = b, e = e1 }",
      "Q2 : one { c = c2, b = b, e = x }",
      `e1 -- R1 : resistor ${R1} Ω -- x -- R2 : resistor ${R2} Ω -- ground`,
      "show b.v, c1.v, e1.v, x.v, Q1.c.i, difference = e1.v - x.v",
    ),
    expected: [
      { trace: "b.v", value: solved(one, "b"), relative: CLOSED_FORM },
      { trace: "c1.v", value: solved(one, "c"), relative: CLOSED_FORM },
      { trace: "e1.v", value: solved(one, "e1"), relative: CLOSED_FORM },
      { trace: "x.v", value: solved(one, "x"), relative: CLOSED_FORM },
      { trace: "Q1.c.i", value: solved(one, "IC"), relative: CLOSED_FORM },
      { trace: "difference", value: solved(one, "dVBE"), relative: CLOSED_FORM },
    ],
  };
}

/** Voltages that rise with temperature, and the cell that adds one to a junction (Brokaw 1974, from memory). */
export const BANDGAP: readonly OutsideCase[] = [
  ...proportional(record("TB11a")),
  areas(record("TB11b")),
  areas(record("TB11c")),
  cell(record("TB11d")),
  cell(record("TB11e")),
];
