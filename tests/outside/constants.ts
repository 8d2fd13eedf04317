import reference from "@/tests/reference/constants.json";
import { lines, listed, type OutsideCase } from "./case";

// Exact by definition (SI Brochure, 9th ed., BIPM 2019, section 2.2), so binary64 must agree to 2 ulp, and products of two
// rounded factors to 4.
const TWO_ULP = 4.5e-16;

const rows = reference.temperatures;

/** kT/q and its multiples at every temperature of the table, as a netlist shows them. */
export const CONSTANTS: readonly OutsideCase[] = [
  {
    id: "constants",
    source: reference.source,
    text: lines(
      'title "Thermal voltage"',
      "ground -- V1 : voltage V_T -- t -- R1 : resistor 1 Ω -- ground",
      `sweep temperature over ${listed(
        rows.map((row) => row.T_K),
        "K",
      )}`,
      "show k = k_B, q = q_e, ratio = k_B / q_e, thermal = V_T, driven = t.v",
      "show decade = V_T * ln(10), octave = V_T * ln(2), inverse = 1 / V_T",
    ),
    expected: rows.flatMap((row, point) => [
      { trace: "k", point, value: reference.k_J_per_K },
      { trace: "q", point, value: reference.q_C },
      { trace: "ratio", point, value: reference.k_over_q_V_per_K, relative: TWO_ULP },
      { trace: "thermal", point, value: row.VT_V, relative: TWO_ULP },
      { trace: "driven", point, value: row.VT_V, relative: TWO_ULP },
      { trace: "decade", point, value: Number(row.mV_per_decade) / 1000, relative: 2 * TWO_ULP },
      { trace: "octave", point, value: Number(row.mV_per_octave) / 1000, relative: 2 * TWO_ULP },
      { trace: "inverse", point, value: row.one_over_VT_per_V, relative: 2 * TWO_ULP },
    ]),
  },
];
