import reference from "@/tests/reference/thermometer.json";
import { lines, listed, type OutsideCase } from "./case";

const { table, fits, source } = reference;

/** K to either side of 300 K, for the slope. */
const STEP = 0.01;

/** mV. The record's formula leaves the −1 of the law out, which at 400 K is worth 3 µV. */
const MINUS_ONE = 0.004;

function circuit(fit: (typeof fits)[number], kelvins: readonly string[]): string {
  return lines(
    `title "Silicon diode thermometer, fitted from ${fit.range_K.join(" K to ")} K"`,
    "let V_300 = k_B * 300 K / q_e",
    `model silicon : diode { Is = 10 µA / (exp(0.559639 V / V_300) - 1), Eg = ${fit.Eg} V, x = ${fit.x}, T0 = 300 K }`,
    "ground -- I1 : current 10 µA -- a -- D1 : diode silicon -- ground",
    `sweep temperature over ${listed(kelvins, "K")}`,
    "show junction = a.v",
  );
}

const deviations: readonly OutsideCase[] = fits.map((fit) => {
  const [low, high] = fit.range_K as [number, number];
  const rows = table.filter(({ T_K }) => Number(T_K) >= low && Number(T_K) <= high);
  return {
    id: "TH1",
    source,
    text: circuit(
      fit,
      rows.map(({ T_K }) => T_K),
    ),
    derive(traces) {
      const junction = traces.get("junction")!;
      const off = rows.map(({ V }, k) => Math.abs(junction[k]! - Number(V)) * 1e3);
      return new Map([["off", Float64Array.of(Math.max(...off))]]);
    },
    expected: [{ trace: "off", value: fit.max_abs_dev_mV, absolute: MINUS_ONE }],
  };
});

const slopes: readonly OutsideCase[] = fits.map((fit) => ({
  id: "TH1",
  source,
  text: circuit(fit, [String(300 - STEP), String(300 + STEP)]),
  derive(traces) {
    const [below, above] = traces.get("junction")!;
    return new Map([["slope", Float64Array.of(((above! - below!) / (2 * STEP)) * 1e3)]]);
  },
  expected: [
    { trace: "slope", value: fit.slope_300K_mV_per_K, relative: 1e-6 },
    // The maker's own slope, −2.30 mV/K, and the table's difference from 290 K to 310 K.
    { trace: "slope", value: reference.table_slope_mV_per_K["300"], absolute: 0.02 },
    { trace: "slope", value: reference.slope_from_table_290_310, absolute: 0.02 },
  ],
}));

/** A published curve of a silicon diode at 10 µA; the source stands beside the table. */
export const THERMOMETER: readonly OutsideCase[] = [...deviations, ...slopes];
