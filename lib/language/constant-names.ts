import { BOLTZMANN, ELEMENTARY_CHARGE } from "@/lib/units/constants";
import { AMPERE, type Dimension, divide, KELVIN, multiply, PURE, VOLT } from "@/lib/units/dimension";
import type { Typed } from "./ast";

const SECOND: Dimension = [0, 0, 1, 0, 0];
const COULOMB = multiply(AMPERE, SECOND);

/** What every file knows by name: the exact constants of the SI, π, and the thermal voltage at the present temperature. */
export function constantNamed(name: string): Typed | null {
  switch (name) {
    case "pi":
      return { op: "constant", value: Math.PI, dimension: PURE };
    case "k_B":
      return { op: "constant", value: BOLTZMANN, dimension: divide(multiply(COULOMB, VOLT), KELVIN) };
    case "q_e":
      return { op: "constant", value: ELEMENTARY_CHARGE, dimension: COULOMB };
    case "V_T":
      return { op: "thermal voltage", dimension: VOLT };
    default:
      return null;
  }
}
