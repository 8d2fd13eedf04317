import { type DiodeAt, diodeVoltage } from "./diode";

/** A backward step lowers a junction's current to this part of it at most, unless the linear model asks for less voltage. */
const LEAST_CURRENT = 0.1;

/**
 * Where to linearise a junction next, in V. Newton's linear model, taken at `v` with current `i` and slope `g`, asks for `target`;
 * the point kept is the one at which the junction carries the current that the model gives there, I(v⁺) = i + g·(target − v):
 * for a diode without resistance v⁺ = v + η·ln(1 + Δv/η). So a step forward never overflows, and a junction fed by a
 * current arrives in one. Below 0 V the model says nothing of the forward current, and a forward step starts at 0 V.
 */
export function junctionStep(at: DiodeAt, v: number, i: number, g: number, target: number): number {
  if (target > v) {
    if (v >= 0) return diodeVoltage(at, i + g * (target - v));
    return target <= 0 ? target : diodeVoltage(at, slopeAtZero(at) * target);
  }
  if (v <= 0) return target;
  const asked = i + g * (target - v);
  return asked > LEAST_CURRENT * i
    ? diodeVoltage(at, asked)
    : Math.min(target, diodeVoltage(at, LEAST_CURRENT * i));
}

function slopeAtZero({ Is, eta, Rs }: DiodeAt): number {
  return 1 / (eta / Is + Rs);
}
