import reference from "@/tests/reference/log-converters.json";
import { CLOSED_FORM, type Expected, lines, listed, type OutsideCase } from "./case";

const { params, formula } = reference.temperature;
const rows = reference.temperature_rows;
const currents = [...new Set(rows.map((row) => row.I))];
const celsius = [...new Set(rows.map((row) => row.T_C))];

/** K to either side, for the slope. */
const STEP = 0.01;

function pointOf(row: (typeof rows)[number]): number {
  return currents.indexOf(row.I) + currents.length * celsius.indexOf(row.T_C);
}

function expectedAt(row: (typeof rows)[number]): readonly Expected[] {
  const point = pointOf(row);
  return [
    { trace: "saturation", point, value: row.Is, relative: CLOSED_FORM },
    { trace: "junction", point, value: row.V, absolute: CLOSED_FORM },
  ];
}

const CIRCUIT: readonly string[] = [
  "knob I_x = 1 mA",
  `model junction : diode { Is = ${params.Is_0} A, n = ${params.n}, Eg = ${params.Eg} V, x = ${params.x}, T0 = ${params.T0} K }`,
  "ground -- I1 : current I_x -- a -- D1 : diode junction -- ground",
  "ground -- V2 : voltage -20 V -- r -- D2 : diode junction -- ground",
  `sweep I_x over ${listed(currents, "A")}`,
];

/** Is as the reverse current at −20 V, and the voltage of the junction at five currents. */
const levels: OutsideCase = {
  id: "temperature",
  source: formula,
  text: lines(
    'title "Junction over temperature"',
    ...CIRCUIT,
    `sweep temperature over ${listed(celsius, "°C")}`,
    "show saturation = -D2.i, junction = a.v",
  ),
  expected: rows.flatMap(expectedAt),
};

/** The slope as a difference over 0.02 K, which leaves 1e-6 of it at most: the table's tolerance for differences. */
const slopes: OutsideCase = {
  id: "temperature",
  source: formula,
  text: lines(
    'title "Slope of a junction over temperature"',
    ...CIRCUIT,
    `sweep temperature over ${listed(
      celsius.flatMap((t) => [(Number(t) - STEP).toFixed(2), (Number(t) + STEP).toFixed(2)]),
      "°C",
    )}`,
    "show junction = a.v",
  ),
  derive(traces) {
    const volts = traces.get("junction")!;
    const slope = Float64Array.from(rows, (_, point) => {
      const below = (point % currents.length) + 2 * currents.length * Math.floor(point / currents.length);
      return (volts[below + currents.length]! - volts[below]!) / (2 * STEP);
    });
    return new Map([["slope", slope]]);
  },
  expected: rows.map((row) => ({ trace: "slope", point: pointOf(row), value: row.dVdT, relative: 1e-6 })),
};

/** The junction's temperature law; the formula stands beside the table. */
export const JUNCTION_TEMPERATURE: readonly OutsideCase[] = [levels, slopes];
