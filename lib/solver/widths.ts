import type { Gap } from "@/lib/circuit/part";

/** V per V. No gap is taken to be narrower, so that rounding does not decide. */
const LEAST_WIDTH = 1e-9;

/**
 * How far each gap may move while its two unknowns move by their weights: by both together at most, or by less where it is held to a width
 * of its own, which the certificate must then prove as it proves the weights.
 */
export class Widths {
  /** As the parts read them. */
  readonly values: Float64Array;
  /** Infinity where a gap is not held. */
  private readonly held: Float64Array;

  constructor(private readonly gaps: readonly Gap[]) {
    this.values = new Float64Array(gaps.length);
    this.held = new Float64Array(gaps.length).fill(Number.POSITIVE_INFINITY);
  }

  /** No gap is held. */
  release(): void {
    this.held.fill(Number.POSITIVE_INFINITY);
  }

  hold(gap: number, width: number): void {
    this.held[gap] = Math.max(width, LEAST_WIDTH);
  }

  /** Fills `values` for the weights at hand. */
  measure(weights: Float64Array): void {
    const { gaps, held, values } = this;
    for (let g = 0; g < gaps.length; g++) {
      const [a, b] = gaps[g]!;
      values[g] = Math.min(held[g]!, weights[a]! + weights[b]!);
    }
  }

  /** Whether the width of a gap stands only if it is proved. */
  isHeld(gap: number): boolean {
    return this.held[gap] === this.values[gap];
  }
}
