import { CLOSED_FORM, figure, lines, listed, type OutsideCase, type Reference } from "./case";
import { record, temperature, transistor } from "./textbook";

/** Differences of two currents of some 1e-4 A: what rounding of either leaves over. */
const DIFFERENCE = 1e-18;

function supply({ params }: Reference): string {
  return `ground -- VC : voltage ${params.VC} V -- vc`;
}

function pair(one: Reference): OutsideCase {
  const rows = one.rows!;
  const { IEE, beta_f } = one.params;
  return {
    id: one.id,
    source: one.source,
    text: lines(
      `title "${one.id}: pair"`,
      temperature(one),
      "knob V_d = 0 V",
      transistor("array", one),
      supply(one),
      "ground -- VD : voltage V_d -- b",
      "Q1 : array { c = vc, b = b, e = e }",
      "Q2 : array { c = vc, b = ground, e = e }",
      `e -- IE : current ${IEE} A -- ground`,
      `sweep V_d over ${listed(
        rows.map((row) => figure(row, "VID")),
        "V",
      )}`,
      "show e = e.v, IC1 = Q1.c.i, IC2 = Q2.c.i, IDIFF = Q1.c.i - Q2.c.i",
      `show tanh_law = ${beta_f} / (${beta_f} + 1) * ${IEE} A * tanh(V_d / (2 * V_T))`,
    ),
    expected: rows.flatMap((row, point) => [
      { trace: "e", point, value: figure(row, "e"), relative: CLOSED_FORM },
      { trace: "IC1", point, value: figure(row, "IC1"), relative: CLOSED_FORM },
      { trace: "IC2", point, value: figure(row, "IC2"), relative: CLOSED_FORM },
      {
        trace: "IDIFF",
        point,
        value: figure(row, "IDIFF"),
        relative: CLOSED_FORM,
        absolute: DIFFERENCE,
      },
      { trace: "IDIFF", point, value: figure(row, "tanh_law"), absolute: 1e-14 },
      { trace: "tanh_law", point, value: figure(row, "tanh_law"), relative: CLOSED_FORM },
    ]),
  };
}

function gainCell(one: Reference): OutsideCase {
  const rows = one.rows!;
  const { IX, IE, VB } = one.params;
  return {
    id: one.id,
    source: one.source,
    text: lines(
      `title "${one.id}: gain cell"`,
      temperature(one),
      "knob X = 0",
      transistor("array", one),
      supply(one),
      `ground -- VB : voltage ${VB} V -- vb`,
      "Q1 : array { c = vb, b = vb, e = p }",
      "Q2 : array { c = vb, b = vb, e = m }",
      "Q3 : array { c = vc, b = m, e = e }",
      "Q4 : array { c = vc, b = p, e = e }",
      `p -- IP : current ${IX} A * (1 + X) / 2 -- ground`,
      `m -- IM : current ${IX} A * (1 - X) / 2 -- ground`,
      `e -- IE : current ${IE} A -- ground`,
      `sweep X over ${rows.map((row) => row.X).join(", ")}`,
      "show p = p.v, m = m.v, e = e.v, I3 = Q3.c.i, I4 = Q4.c.i, IDIFF = Q3.c.i - Q4.c.i",
    ),
    expected: rows.flatMap((row, point) => [
      ...["p", "m", "e", "I3", "I4"].map((trace) => {
        return { trace, point, value: figure(row, trace), relative: CLOSED_FORM };
      }),
      {
        trace: "IDIFF",
        point,
        value: figure(row, "IDIFF"),
        relative: CLOSED_FORM,
        absolute: DIFFERENCE,
      },
    ]),
  };
}

function multiplierCell(one: Reference, row: Readonly<Record<string, string>>): OutsideCase {
  const { VB1, VB2, IEE } = one.params;
  return {
    id: one.id,
    source: one.source,
    text: lines(
      `title "${one.id}: multiplier cell"`,
      temperature(one),
      `let V_1 = ${row.V1} V`,
      `let V_2 = ${row.V2} V`,
      transistor("array", one),
      supply(one),
      `ground -- B1 : voltage ${VB1} V + V_1 / 2 -- b1p`,
      `ground -- B2 : voltage ${VB1} V - V_1 / 2 -- b1m`,
      `ground -- B3 : voltage ${VB2} V + V_2 / 2 -- b2p`,
      `ground -- B4 : voltage ${VB2} V - V_2 / 2 -- b2m`,
      "Q1 : array { c = c1, b = b1p, e = e }",
      "Q2 : array { c = c2, b = b1m, e = e }",
      "Q3 : array { c = vc, b = b2p, e = c1 }",
      "Q4 : array { c = vc, b = b2m, e = c1 }",
      "Q5 : array { c = vc, b = b2m, e = c2 }",
      "Q6 : array { c = vc, b = b2p, e = c2 }",
      `e -- IE : current ${IEE} A -- ground`,
      "show e = e.v, c1 = c1.v, c2 = c2.v, IDIFF = Q3.c.i + Q5.c.i - Q4.c.i - Q6.c.i",
    ),
    expected: [
      ...["e", "c1", "c2"].map((trace) => {
        return { trace, value: figure(row, trace), relative: CLOSED_FORM };
      }),
      { trace: "IDIFF", value: figure(row, "IDIFF"), relative: CLOSED_FORM, absolute: DIFFERENCE },
    ],
  };
}

/** Emitter-coupled pairs by the law of Ebers and Moll 1954 (from memory); sources beside each record. */
export const PAIRS: readonly OutsideCase[] = [
  pair(record("TB06")),
  gainCell(record("TB09a")),
  ...record("TB09b").rows!.map((row) => multiplierCell(record("TB09b"), row)),
];
