import type { State } from "@/lib/circuit/state";

/** Solved neighbours that a prediction uses at most. */
const DEPTH = 3;

/**
 * Predicts the next point of a strand by the polynomial through the last solved neighbours, at most a parabola: points of an
 * axis stand evenly on its own scale, and unknowns are smooth there. After a failed point the next starts cold.
 */
export class Predictor {
  private readonly history: Float64Array[];
  private known = 0;

  constructor(private readonly state: State) {
    this.history = Array.from({ length: DEPTH }, () => new Float64Array(state.x.length));
  }

  /** Forgets every neighbour, at the beginning of a strand. */
  reset(): void {
    this.known = 0;
  }

  /** Puts the prediction into the unknowns; false where there is no neighbour to start from. */
  predict(): boolean {
    const { x, low } = this.state;
    const [one, two, three] = this.history as [Float64Array, Float64Array, Float64Array];
    if (this.known === 0) return false;
    low.fill(0);
    for (let j = 0; j < x.length; j++) {
      if (this.known === 1) x[j] = one[j]!;
      else if (this.known === 2) x[j] = one[j]! + (one[j]! - two[j]!);
      else x[j] = three[j]! + 3 * (one[j]! - two[j]!);
    }
    return true;
  }

  /** Keeps the point just solved. */
  learn(converged: boolean): void {
    if (!converged) {
      this.known = 0;
      return;
    }
    const oldest = this.history.pop()!;
    oldest.set(this.state.x);
    this.history.unshift(oldest);
    this.known = Math.min(DEPTH, this.known + 1);
  }
}
