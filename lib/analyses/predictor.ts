import type { State } from "@/lib/circuit/state";

/** Solved neighbours that a prediction uses at most. */
const DEPTH = 7;

/**
 * Predicts the next point of a strand by the polynomial through the last solved neighbours (Newton's backward differences): points of
 * an axis stand evenly on its own scale, and unknowns are smooth there. Of the polynomials, up to the sixth degree, the one is taken
 * that would have predicted the last point best. After a failed point the next starts cold.
 */
export class Predictor {
  /** The differences ∇⁰x = x, ∇¹x, ∇²x, … at the last point. */
  private readonly differences: Float64Array[];
  private known = 0;
  private degree = 0;

  constructor(private readonly state: State) {
    this.differences = Array.from({ length: DEPTH }, () => new Float64Array(state.x.length));
  }

  /** Forgets every neighbour, at the beginning of a strand. */
  reset(): void {
    this.known = 0;
  }

  /** Puts the prediction into the unknowns; false where there is no neighbour to start from. */
  predict(): boolean {
    const { x, low } = this.state;
    if (this.known === 0) return false;
    x.fill(0);
    low.fill(0);
    // The highest differences are the smallest, and are added first.
    for (let m = this.degree; m >= 0; m--) {
      const difference = this.differences[m]!;
      for (let j = 0; j < x.length; j++) x[j]! += difference[j]!;
    }
    return true;
  }

  /** Keeps the point just solved. */
  learn(converged: boolean): void {
    if (!converged) {
      this.known = 0;
      return;
    }
    const { x } = this.state;
    const { differences } = this;
    let least = Number.POSITIVE_INFINITY;
    let best = -1;
    const count = Math.min(DEPTH, this.known + 1);
    for (let j = 0; j < x.length; j++) {
      let rising = x[j]!;
      for (let m = 0; m < count; m++) {
        const before = differences[m]![j]!;
        differences[m]![j] = rising;
        rising -= before;
      }
    }
    for (let m = 1; m < count; m++) {
      // ∇ᵐx is how far the polynomial of degree m − 1 was off.
      const off = largest(differences[m]!, x);
      if (off >= least) continue;
      least = off;
      best = m - 1;
    }
    this.known = count;
    this.degree = Math.min(best === count - 2 ? count - 1 : best, DEPTH - 1);
  }
}

/** The largest difference, each in units of 1 V and of its unknown: currents, which follow the voltages, weigh little. */
function largest(difference: Float64Array, x: Float64Array): number {
  let most = 0;
  for (let j = 0; j < x.length; j++) {
    const one = Math.abs(difference[j]!) / (1 + Math.abs(x[j]!));
    if (one > most) most = one;
  }
  return most;
}
