import { CLOSED_FORM, figure, lines, type OutsideCase, type Reference } from "./case";
import { record, temperature } from "./textbook";

function parts({ params }: Reference): readonly string[] {
  return [
    `let R = ${params.R} Ω`,
    `model junction : diode { Is = ${params.Is} A, n = ${params.n} }`,
    "model amp : opamp { }",
  ];
}

/** A log stage of the input `k`: out_k falls with the logarithm of V_k. */
function logStage(k: string, volts: string): readonly string[] {
  return [
    `ground -- V${k} : voltage ${volts} -- in_${k} -- R${k} : resistor R -- n_${k} -- D${k} : junction -- out_${k}`,
    `A${k} : amp { plus = ground, minus = n_${k}, out = out_${k} }`,
  ];
}

/** An inverter of weight feedback/R for each of the nets in `from`. */
function inverter(name: string, from: readonly string[], to: string, feedback: string): readonly string[] {
  return [
    ...from.map((net) => `${net} -- R_${name}_${net} : resistor R -- n_${name}`),
    `n_${name} -- R_${name} : resistor ${feedback} -- ${to}`,
    `A_${name} : amp { plus = ground, minus = n_${name}, out = ${to} }`,
  ];
}

/** The law without its −1 terms holds to Is over the smallest current. */
function idealError({ params }: Reference, row: Readonly<Record<string, string>>): number {
  const volts = Math.min(...["VX", "VY", "VU", "ideal"].map((name) => Number(figure(row, name))));
  return (Number(params.Is) * Number(params.R)) / volts;
}

function quotient(one: Reference, row: Readonly<Record<string, string>>): OutsideCase {
  const voltages = ["vox", "voy", "vou", "v4", "v5"].map((trace) => {
    return { trace, value: figure(row, trace), relative: CLOSED_FORM };
  });
  return {
    id: one.id,
    source: one.source,
    text: lines(
      `title "${one.id}: product over a third voltage"`,
      temperature(one),
      ...parts(one),
      ...logStage("x", `${row.VX} V`),
      ...logStage("y", `${row.VY} V`),
      ...logStage("u", `${row.VU} V`),
      ...inverter("sum", ["out_x", "out_y"], "v4", "R"),
      ...inverter("difference", ["v4", "out_u"], "v5", "R"),
      "n_z -- DZ : junction -- v5",
      "n_z -- RZ : resistor R -- out",
      "AZ : amp { plus = ground, minus = n_z, out = out }",
      "show vox = out_x.v, voy = out_y.v, vou = out_u.v, v4 = v4.v, v5 = v5.v, product = out.v",
    ),
    expected: [
      ...voltages,
      // The antilog multiplies the last rounding of v5 by v5/(n·V_T), about 25.
      { trace: "product", value: figure(row, "vout"), relative: CLOSED_FORM },
      { trace: "product", value: figure(row, "ideal"), relative: idealError(one, row) },
    ],
  };
}

function root(one: Reference): OutsideCase {
  const rows = one.rows!;
  return {
    id: one.id,
    source: one.source,
    text: lines(
      `title "${one.id}: square root"`,
      temperature(one),
      "knob V_x = 1 V",
      ...parts(one),
      ...logStage("x", "V_x"),
      ...logStage("u", `${one.params.VU} V`),
      ...inverter("mean", ["out_x", "out_u"], "v4", "R / 2"),
      "v4 -- DZ : junction -- n_z -- RZ : resistor R -- out",
      "AZ : amp { plus = ground, minus = n_z, out = out }",
      `sweep V_x over ${rows.map((row) => `${row.VX} V`).join(", ")}`,
      "show vox = out_x.v, vou = out_u.v, v4 = v4.v, vout = out.v",
    ),
    expected: rows.flatMap((row, point) =>
      ["vox", "vou", "v4", "vout"].map((trace) => {
        return { trace, point, value: figure(row, trace), relative: CLOSED_FORM };
      }),
    ),
  };
}

/** Log, sum and antilog: the exact law with the −1 terms is (Ix + Is)(Iy + Is) = (Iu + Is)(Iz + Is); Gilbert 1975. */
export const ONE_QUADRANT: readonly OutsideCase[] = [
  ...record("TB07").rows!.map((row) => quotient(record("TB07"), row)),
  root(record("TB08")),
];
