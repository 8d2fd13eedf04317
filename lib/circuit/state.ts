/**
 * What Newton's method works on. Vectors have `size` + 1 entries, the last for ground: 0 in `x`, never read in the others.
 *
 * The unknowns are the unevaluated sums x + low (Dekker, Numer. Math. 18, 1971): a net at 10 V is known to 2e-15 V in one number,
 * which through 1 Ω is 2 fA, more than the acceptance test lets pass where picoamperes flow.
 *
 * The arrays may be others from point to point, so hold the state and not them.
 */
export interface State {
  x: Float64Array;
  low: Float64Array;
  /** F: the sum of the currents leaving each net (A), the mismatch of each branch law (V). */
  residual: Float64Array;
  /** The sum of the magnitudes that `residual` sums. */
  scale: Float64Array;
  /** Values of the Jacobian, places as in the pattern; read only, but for the assembly. */
  jacobian: Float64Array;
  /** The part of every source that acts; 1 but while sources are ramped. */
  share: number;
}

/** A state at rest, whose arrays `take` gives, all 0, in the order of the fields. */
export function newState(
  size: number,
  places: number,
  take: (length: number) => Float64Array = (length) => new Float64Array(length),
): State {
  const vector = () => take(size + 1);
  return {
    x: vector(),
    low: vector(),
    residual: vector(),
    scale: vector(),
    jacobian: take(places),
    share: 1,
  };
}

/** v_a − v_b in V, with the digits that the rounded voltages alone do not have. */
export function across(state: State, a: number, b: number): number {
  return state.x[a]! - state.x[b]! + (state.low[a]! - state.low[b]!);
}

/** A current of `amperes` leaves net `a` and enters net `b`. */
export function flow(state: State, a: number, b: number, amperes: number): void {
  const size = Math.abs(amperes);
  state.residual[a]! += amperes;
  state.residual[b]! -= amperes;
  state.scale[a]! += size;
  state.scale[b]! += size;
}

/** Adds `step` to the unknowns; the rounding error of each sum stays in `low` (Knuth's two-sum). */
export function advance({ x, low }: State, step: Float64Array): void {
  const size = x.length - 1;
  for (let j = 0; j < size; j++) {
    const a = x[j]!;
    const d = step[j]!;
    const sum = a + d;
    const part = sum - a;
    const rest = low[j]! + (a - (sum - part) + (d - part));
    const high = sum + rest;
    x[j] = high;
    low[j] = rest - (high - sum);
  }
}
