import type { Sweep, Window } from "./ast";

/** Relative difference below which two values of a knob are the same: rounding of the text's arithmetic, no more. */
const SAME = 1e-9;

type Ends = Pick<Window, "low" | "high">;

/** Whether a value of the window's knob lies in it, its ends included. */
export function isInWindow({ low, high }: Ends, value: number): boolean {
  const slack = SAME * Math.max(Math.abs(low), Math.abs(high));
  return value >= low - slack && value <= high + slack;
}

/** One window a knob: what lies in all of those given. */
export function narrowed(windows: Iterable<Window>): Window[] {
  const byKnob = new Map<string, Window>();
  for (const window of windows) {
    const known = byKnob.get(window.knob);
    const low = Math.max(window.low, known?.low ?? window.low);
    const high = Math.min(window.high, known?.high ?? window.high);
    byKnob.set(window.knob, { ...window, low, high });
  }
  return [...byKnob.values()];
}

/** Places on a sweep that lie in every window of its knob. */
export function placesWithin(
  { knob, values }: Pick<Sweep, "knob" | "values">,
  windows: readonly Window[],
): number[] {
  const own = windows.filter((window) => window.knob === knob);
  return [...values.keys()].filter((place) => own.every((window) => isInWindow(window, values[place]!)));
}

/** The values of a sweep in rising order, for many questions about them. */
export class Grid {
  private readonly values: Float64Array;

  constructor({ values }: Pick<Sweep, "values">) {
    this.values = Float64Array.from(values).sort();
  }

  /** How many lie in a window. */
  count(window: Ends): number {
    const slack = SAME * Math.max(Math.abs(window.low), Math.abs(window.high));
    return Math.max(0, this.below(window.high + slack, true) - this.below(window.low - slack, false));
  }

  /** The value that lies nearest, by ratio where both have one sign. */
  nearest(wanted: number): number {
    const above = this.below(wanted, false);
    const apart = (value: number) =>
      value * wanted > 0 ? Math.abs(Math.log(value / wanted)) : Math.abs(value - wanted) * 1e300;
    const neighbours = this.values.slice(Math.max(0, above - 1), above + 1);
    return neighbours.reduce((best, value) => (apart(value) < apart(best) ? value : best));
  }

  /** How many values are less than `bound`, or no more than it. */
  private below(bound: number, isIncluded: boolean): number {
    let [from, to] = [0, this.values.length];
    while (from < to) {
      const middle = (from + to) >> 1;
      const value = this.values[middle]!;
      if (value < bound || (isIncluded && value === bound)) from = middle + 1;
      else to = middle;
    }
    return from;
  }
}
