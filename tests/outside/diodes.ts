import reference from "@/tests/reference/diode-with-resistor.json";
import { CLOSED_FORM, figure, lines, type OutsideCase, type Reference } from "./case";

export const DIODE_TABLE = reference.cases as unknown as readonly Reference[];

/** The tolerance of the table: currents below 1e-15 A to 1e-27 A, voltages to 1e-14 V. */
const FAINT = 1e-27;
const VOLTS = 1e-14;

/**
 * Each record twice: the resistor as an element of its own, and as the series resistance of the diode, which the device
 * eliminates by the Wright omega function. Source beside each record: Corless et al. 1996; Banwell and Jayakumar 2000.
 */
export const DIODES: readonly OutsideCase[] = DIODE_TABLE.flatMap((record) => {
  const { id, source, params, solutions } = record;
  const [V, R, Is, n, T] = ["V", "R", "Is", "n", "T"].map((name) => figure(params, name));
  const outputs = solutions![0]!.outputs;
  const current = {
    trace: "D1.i",
    value: figure(outputs, "I"),
    relative: CLOSED_FORM,
    absolute: FAINT,
  };
  return [
    {
      id,
      source,
      text: lines(
        `title "${id}: resistor and diode"`,
        `knob temperature = ${T} K`,
        `model junction : diode { Is = ${Is} A, n = ${n} }`,
        `ground -- V1 : voltage ${V} V -- in -- R1 : resistor ${R} Ω -- a -- D1 : diode junction -- ground`,
        "show a.v, D1.i, R1.v",
      ),
      expected: [
        current,
        { trace: "a.v", value: figure(outputs, "Vd"), absolute: VOLTS },
        { trace: "R1.v", value: figure(outputs, "VR"), relative: CLOSED_FORM, absolute: VOLTS },
      ],
    },
    {
      id,
      source,
      text: lines(
        `title "${id}: diode with series resistance"`,
        `knob temperature = ${T} K`,
        `model junction : diode { Is = ${Is} A, n = ${n}, Rs = ${R} Ω }`,
        `ground -- V1 : voltage ${V} V -- in -- D1 : diode junction -- ground`,
        "show D1.i",
      ),
      expected: [current],
    },
  ];
});
