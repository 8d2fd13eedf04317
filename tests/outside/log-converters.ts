import reference from "@/tests/reference/log-converters.json";
import { figure, lines, listed, type OutsideCase, type Reference } from "./case";

export const LOG_TABLE = reference.log_converters as unknown as readonly Reference[];
export const ANTILOG_TABLE = reference.antilog_converters as unknown as readonly Reference[];

function amplifier({ params }: Reference): string {
  if (params.A === undefined) return "model amp : opamp { }";
  return `model amp : opamp { gain = ${params.A}, offset = ${params.offset} V, bias = ${params.bias} A }`;
}

function inputs({ rows }: Reference): string {
  return `sweep V_in over ${listed(
    rows!.map((row) => figure(row, "VIN")),
    "V",
  )}`;
}

/** Source beside each record: Lambert W over the diode with resistor; Ebers and Moll 1954 for the transistor. */
export const LOG_CONVERTERS: readonly OutsideCase[] = LOG_TABLE.map((record) => {
  const { id, source, params, rows } = record;
  const isDiode = params.n !== undefined;
  return {
    id,
    source,
    text: lines(
      `title "${id}"`,
      `knob temperature = ${params.T} K`,
      "knob V_in = 1 V",
      amplifier(record),
      isDiode
        ? `model junction : diode { Is = ${params.Is} A, n = ${params.n} }`
        : `model junction : npn { Is = ${params.Is} A, beta_f = ${params.beta_f}, beta_r = ${params.beta_r} }`,
      `ground -- V1 : voltage V_in -- in -- R1 : resistor ${params.R} Ω -- n`,
      isDiode ? "n -- D1 : diode junction -- out" : "Q1 : junction { c = n, b = ground, e = out }",
      "A1 : amp { plus = ground, minus = n, out = out }",
      inputs(record),
      "show out.v, n.v",
    ),
    expected: rows!.flatMap((row, point) => [
      { trace: "out.v", point, value: figure(row, "vout_exact"), absolute: 1e-12 },
      { trace: "n.v", point, value: figure(row, "vn"), absolute: 1e-12 },
    ]),
  };
});

/** Source beside each record: exact by inspection; Lambert W. */
export const ANTILOG_CONVERTERS: readonly OutsideCase[] = ANTILOG_TABLE.map((record) => {
  const { id, source, params, rows } = record;
  return {
    id,
    source,
    text: lines(
      `title "${id}"`,
      `knob temperature = ${params.T} K`,
      "knob V_in = 0.5 V",
      amplifier(record),
      `model junction : diode { Is = ${params.Is} A, n = ${params.n} }`,
      `ground -- V1 : voltage V_in -- in -- D1 : diode junction -- n -- R1 : resistor ${params.R} Ω -- out`,
      "A1 : amp { plus = ground, minus = n, out = out }",
      inputs(record),
      "show out.v, n.v",
    ),
    expected: rows!.flatMap((row, point) => [
      { trace: "out.v", point, value: figure(row, "vout"), relative: 1e-12, absolute: 1e-12 },
      { trace: "n.v", point, value: figure(row, "vn"), absolute: 1e-12 },
    ]),
  };
});
