import type { Sweep, Window } from "./ast";

/** Relative difference below which two values of a knob are the same: rounding of the text's arithmetic, no more. */
const SAME = 1e-9;

/** Whether a value of the window's knob lies in it, its ends included. */
export function isInWindow({ low, high }: Pick<Window, "low" | "high">, value: number): boolean {
  const slack = SAME * Math.max(Math.abs(low), Math.abs(high), Math.abs(value));
  return value >= low - slack && value <= high + slack;
}

/** Places on a sweep that lie in every window of its knob. */
export function placesWithin(
  { knob, values }: Pick<Sweep, "knob" | "values">,
  windows: readonly Window[],
): number[] {
  const own = windows.filter((window) => window.knob === knob);
  return [...values.keys()].filter((place) => own.every((window) => isInWindow(window, values[place]!)));
}

/** The value of a sweep that lies nearest to `wanted`, by ratio where both have one sign. */
export function nearestValue({ values }: Pick<Sweep, "values">, wanted: number): number {
  const apart = (value: number) =>
    value * wanted > 0 ? Math.abs(Math.log(value / wanted)) : Math.abs(value - wanted) * 1e300;
  return values.reduce((best, value) => (apart(value) < apart(best) ? value : best));
}
