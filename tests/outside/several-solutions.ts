import { readFileSync } from "node:fs";
import { lines } from "./case";

/** A circuit with several operating points: all of them, to 40 digits, and why there are no more. */
export interface SeveralSolutions {
  readonly id: string;
  readonly source: string;
  readonly completeness: string;
  readonly params: Readonly<Record<string, string>>;
  readonly solutions: readonly {
    readonly values: Readonly<Record<string, string>>;
    readonly remark?: string;
  }[];
  /** Where the solutions that depend on a parameter turn back. */
  readonly turning_points?: readonly Readonly<Record<string, unknown>>[];
}

const { cases } = JSON.parse(readFileSync("tests/reference/several-solutions.json", "utf8")) as {
  cases: readonly SeveralSolutions[];
};

export const SEVERAL: readonly SeveralSolutions[] = cases;

const TUNNEL_DIODE = ({ params: { E, R } }: SeveralSolutions) =>
  lines(
    `knob E = ${E} V`,
    // The record counts in mA and kΩ.
    `ground -- V1 : voltage E -- in -- R : resistor ${R} kΩ -- v`,
    "L : law { plus = v, minus = ground, amps = 1 mA * (17.76 * (L.v / 1 V) - 103.79 * (L.v / 1 V)^2",
    "  + 229.62 * (L.v / 1 V)^3 - 226.31 * (L.v / 1 V)^4 + 83.72 * (L.v / 1 V)^5) }",
    "show v.v",
  );

const EXPONENTIAL_TUNNEL_DIODE = ({ params: { E, R, Ip, Vp, Is, T } }: SeveralSolutions) =>
  lines(
    `knob temperature = ${T} K`,
    `knob E = ${E} V`,
    `let Vp = ${Vp} V`,
    `ground -- V1 : voltage E -- in -- R1 : resistor ${R} Ω -- v`,
    `L : law { plus = v, minus = ground, amps = ${Ip} A * (L.v / Vp) * exp(1 - L.v / Vp) + ${Is} A * (exp(L.v / V_T) - 1) }`,
    "show v.v",
  );

const FLIP_FLOP = ({ params: { VCC, R, Is, beta_f, beta_r, T } }: SeveralSolutions) =>
  lines(
    `knob temperature = ${T} K`,
    `model q : npn { Is = ${Is} A, beta_f = ${beta_f}, beta_r = ${beta_r} }`,
    `ground -- V1 : voltage ${VCC} V -- vcc`,
    `vcc -- R1 : resistor ${R} Ω -- v1`,
    `vcc -- R2 : resistor ${R} Ω -- v2`,
    "Q1 : q { c = v1, b = v2, e = ground }",
    "Q2 : q { c = v2, b = v1, e = ground }",
    "show v1.v, v2.v",
  );

const SCHMITT_TRIGGER = ({ params }: SeveralSolutions) =>
  lines(
    `knob temperature = ${params.T} K`,
    `knob VIN = ${params.VIN} V`,
    `model q : npn { Is = ${params.Is} A, beta_f = ${params.beta_f}, beta_r = ${params.beta_r} }`,
    `ground -- V1 : voltage ${params.VCC} V -- vcc`,
    "ground -- V2 : voltage VIN -- in",
    `vcc -- RC1 : resistor ${params.RC1} Ω -- c1`,
    `vcc -- RC2 : resistor ${params.RC2} Ω -- c2`,
    `c1 -- R1 : resistor ${params.R1} Ω -- b2 -- R2 : resistor ${params.R2} Ω -- ground`,
    `e -- RE : resistor ${params.RE} Ω -- ground`,
    "Q1 : q { c = c1, b = in, e = e }",
    "Q2 : q { c = c2, b = b2, e = e }",
    "sweep VIN from 0 V to 4 V, 81 points",
    "show c1.v",
  );

const LATCH = ({ params }: SeveralSolutions) =>
  lines(
    `knob temperature = ${params.T} K`,
    `model qn : npn { Is = ${params.Is} A, beta_f = ${params.beta_f_npn}, beta_r = ${params.beta_r} }`,
    `model qp : pnp { Is = ${params.Is} A, beta_f = ${params.beta_f_pnp}, beta_r = ${params.beta_r} }`,
    `ground -- V1 : voltage ${params.VCC} V -- vcc -- R1 : resistor ${params.R} Ω -- a`,
    "Q1 : qp { e = a, b = n, c = p }",
    "Q2 : qn { c = n, b = p, e = ground }",
    `a -- RN1 : resistor ${params.RN} Ω -- n`,
    `p -- RP1 : resistor ${params.RP} Ω -- ground`,
    "show a.v",
  );

const CONVERTER = ({ params }: SeveralSolutions) =>
  lines(
    `knob temperature = ${params.T} K`,
    `model d : diode { Is = ${params.Is} A, n = ${params.n} }`,
    "model amp : opamp { }",
    "A1 : amp { plus = p, minus = n, out = out }",
    `out -- RA1 : resistor ${params.RA} Ω -- n -- RB1 : resistor ${params.RB} Ω -- ground`,
    `out -- R1 : resistor ${params.R1} Ω -- p -- R2 : resistor ${params.R2} Ω -- ground`,
    "p -- D1 : d -- ground",
    "ground -- D2 : d -- p",
    "show p.v",
  );

/** The netlist of each record, by the beginning of its id. */
const TEXTS: Readonly<Record<string, (of: SeveralSolutions) => string>> = {
  MS1: TUNNEL_DIODE,
  MS2: EXPONENTIAL_TUNNEL_DIODE,
  MS3: FLIP_FLOP,
  MS4: SCHMITT_TRIGGER,
  MS5: LATCH,
  MS6: CONVERTER,
};

export function textOf(record: SeveralSolutions): string {
  const write = TEXTS[record.id.slice(0, 3)];
  if (write === undefined) throw new Error(`No netlist is written for ${record.id}.`);
  return write(record);
}
