import type { Proof } from "@/lib/circuit/part";
import type { System } from "@/lib/circuit/system";
import { DenseFactors } from "./dense";
import { Doubts } from "./doubts";
import { Inverse } from "./inverse";
import type { LinearSolver } from "./linear";
import { TriangularBounds } from "./triangular";
import { Widths } from "./widths";

/** V. The ball in which slopes are bounded first; what proves a point is usually a thousand times smaller. */
const BALL = 1e-9;
const SMALLEST_BALL = 1e-15;
const LARGEST_BALL = 1e-2;
/** V. No radius is less, so that a circuit at rest, whose voltages have no error at all, leaves its currents one. */
const LEAST_RADIUS = 1e-24;
const MOST_TRIES = 6;
/** A neighbour's inverse serves while it leaves less than this of the unit matrix; the bound is then at most twice as wide. */
const WORN = 0.5;
/** V. Where the sparse factors prove a wider radius, or none, the inverse is tried. */
const CONTENT = 1e-11;
/** Unknowns of a point for which an inverse, which is dense, is made where it may prove a narrower radius, or where nothing else proves any. */
const MOST_DENSE = 300;
const MOST_RESCUED = 1500;
/** V. A wider radius must come from rounding: an answer that one more step would mend is refused. */
const SUSPECT = 1e-10;
/** How many times the part that rounding makes. */
const EXPLAINED = 8;
/** Widens sums of up to a million positive terms by their own rounding. */
const WIDENED = 1 + 2 ** -32;
/** A branch current may move this many times as far as its row asks for, so that a neighbour's weights serve. */
const SPARE = 4;
/** The smallest weight, as a part of what the unit of the unknown suggests. */
const LEAST_WEIGHT = 1e-6;
/** A per V, for a branch that carries nothing. */
const LEAST_CURRENT_WEIGHT = 1e-30;

/**
 * Proves that a true solution lies within r volts of the one at hand (radii polynomial, from the Newton–Kantorovich theorem; Rump,
 * Acta Numerica 19, 2010, from memory). With R ≈ J⁻¹ the map x − R·F(x) sends the ball |x_j − x̄_j| ≤ w_j·r into itself and contracts, if
 *   Y_i + (Z_i + P_i)·r < w_i·r for every i,   Y = |R|·(|F| + δF),   Z = |I − R·J|·w,   P = |R|·(sup|J(x) − J|·w).
 * δF and P come from the parts, the rounding of R·J and of every sum is added. The weights w follow Y of a fresh inverse, so that an
 * output that is an exponential of the nets inside does not decide for all; 1 is the largest of a voltage, those of branch
 * currents are in A per V. Where nets are known far worse than the gaps between them, as around an amplifier that follows one, the gaps are
 * held to widths of their own: rows more that must satisfy the same.
 */
export class Certificate {
  private readonly parts: readonly Proof[];
  private readonly canProve: boolean;
  private readonly triangular: TriangularBounds;
  private readonly inverse: Inverse;
  private readonly widths: Widths;
  /** The inverse with a row for each gap; made where it is first needed. */
  private gapped: Inverse | null = null;
  /** Those in use. */
  private bounds: TriangularBounds | Inverse;
  private readonly step: Float64Array;
  /** The weights are those of this point or of a neighbour. */
  private isWeighed = false;
  private readonly isVoltage: readonly boolean[];
  private readonly weights: Float64Array;
  private readonly doubts: Doubts;
  private readonly spread: Float64Array;

  constructor(
    private readonly system: System,
    private readonly linear: LinearSolver,
  ) {
    const { circuit, parts, pattern } = system;
    const { size } = circuit;
    this.parts = parts.flatMap(({ proof }) => (proof === undefined || proof === "linear" ? [] : [proof]));
    this.widths = new Widths(this.parts.flatMap(({ gaps }) => gaps));
    this.canProve = parts.every(({ proof }) => proof !== undefined);
    this.triangular = new TriangularBounds(pattern);
    this.inverse = new Inverse(pattern);
    this.bounds = this.triangular;
    this.step = new Float64Array(size);
    this.isVoltage = circuit.unknowns.map(({ unit }) => unit === "V");
    this.weights = new Float64Array(size + 1);
    this.doubts = new Doubts(system, this.parts);
    this.spread = new Float64Array(size + 1);
    this.reset();
  }

  /** Forgets the neighbour, at the beginning of a strand. */
  reset(): void {
    this.inverse.forget();
    this.isWeighed = false;
  }

  /**
   * The radius in V for the voltages of the system's state, which must have been assembled with every junction settled right
   * after the last solution of the linear solver; NaN where no radius can be proved.
   */
  prove(): number {
    if (!this.canProve) return Number.NaN;
    this.doubts.gather(1);
    const sparse = this.judged(this.searchSparsely());
    if (sparse <= CONTENT || this.isVoltage.length > (sparse > 0 ? MOST_DENSE : MOST_RESCUED)) return sparse;
    this.doubts.gather(1);
    this.bounds = this.inverse;
    const dense = this.judged(this.searchByInverse());
    return dense >= sparse || Number.isNaN(dense) ? sparse : dense;
  }

  private judged(radius: number): number {
    return radius > SUSPECT && !this.isExplained() ? Number.NaN : radius;
  }

  /** By the factors of the Jacobian at hand. */
  private searchSparsely(): number {
    const { state } = this.system;
    if (!this.linear.solve(state.jacobian, state.residual, this.step)) return Number.NaN;
    const factors = this.linear.atHand;
    if (factors === null) return Number.NaN;
    this.triangular.use(factors);
    this.bounds = this.triangular;
    const radius = this.isWeighed ? this.search(WORN) : Number.NaN;
    if (!Number.isNaN(radius)) return radius;
    this.weigh();
    return this.search(1);
  }

  private searchByInverse(): number {
    const isReused = this.inverse.isKnown;
    let radius = isReused ? this.search(WORN) : Number.NaN;
    // A worn inverse makes rounding look twice as large, so a suspect radius is seen through a fresh one.
    if (Number.isNaN(radius) || (isReused && radius > SUSPECT)) {
      this.inverse.renew(this.system.state.jacobian, this.linear);
      this.weigh();
      radius = this.search(1);
    }
    if (Number.isNaN(radius)) radius = this.searchDensely(this.inverse);
    if (Number.isNaN(radius)) {
      this.inverse.forget();
      radius = this.searchByGaps();
    }
    return radius;
  }

  /** Whether rounding alone makes about as much of the voltage that may err the most. */
  private isExplained(): boolean {
    const { error } = this.bounds;
    let worst = 0;
    for (let i = 1; i < this.isVoltage.length; i++)
      if (this.isVoltage[i] && error[i]! > error[worst]!) worst = i;
    const whole = error[worst]!;
    this.doubts.gather(0);
    this.bounds.carry(this.doubts.values);
    return EXPLAINED * error[worst]! >= whole;
  }

  /** Once more with pivots chosen row by row, where sparse ones make a poor inverse. */
  private searchDensely(inverse: Inverse): number {
    const { jacobian } = this.system.state;
    const factors = DenseFactors.of(this.system.pattern, jacobian);
    if (factors === null) return Number.NaN;
    const solveAgain = (residual: Float64Array, step: Float64Array) => factors.solve(residual, step);
    inverse.renew(jacobian, { solveAgain });
    this.bounds = inverse;
    this.weigh();
    return this.search(1);
  }

  /** With every gap held to the width that its own error asks for, which grows where that is not enough. */
  private searchByGaps(): number {
    const { pattern } = this.system;
    this.gapped ??= new Inverse(
      pattern,
      this.parts.flatMap(({ gaps }) => gaps),
    );
    for (let gap = 0; gap < this.widths.values.length; gap++) this.widths.hold(gap, 0);
    const radius = this.searchDensely(this.gapped);
    this.widths.release();
    return radius;
  }

  /** Weights in proportion to Y; at least a part of 1 V, or of the current that 1 V makes in the rows that a current enters. */
  private weigh(): void {
    const { weights, isVoltage, bounds } = this;
    const { pattern, state } = this.system;
    bounds.carry(this.doubts.values);
    const { error } = bounds;
    const largest = error.reduce((most, one, i) => (isVoltage[i] && one > most ? one : most), 0);
    const scale = largest > LEAST_RADIUS && largest < Number.POSITIVE_INFINITY ? 1 / largest : 1;
    const { rows, columns } = pattern;
    const sums = new Float64Array(weights.length);
    for (let k = 1; k < rows.length; k++) {
      if (isVoltage[columns[k]!]) sums[rows[k]!]! += Math.abs(state.jacobian[k]!);
    }
    weights.fill(0);
    this.isWeighed = true;
    bounds.reweigh();
    for (let k = 1; k < rows.length; k++) {
      const j = columns[k]!;
      const natural = isVoltage[j] ? 1 : sums[rows[k]!]!;
      const wanted = (isVoltage[j] ? 1 : SPARE) * error[j]! * scale;
      weights[j] = Math.max(weights[j]!, LEAST_WEIGHT * natural, wanted);
    }
  }

  /** Tries balls and weights until one proves the point; `most` is the part of a unit matrix that the inverse may leave. */
  private search(most: number): number {
    let ball = BALL;
    for (let tries = 0; tries < MOST_TRIES; tries++) {
      const found = this.attempt(ball, most);
      if (found.kind === "proved") return this.widened(found.radius);
      if (found.kind === "ball too small") ball = 4 * found.radius;
      else if (found.kind === "ball too large") ball /= 1000;
      else if (found.kind !== "weights too small") return Number.NaN;
      if (!(ball >= SMALLEST_BALL && ball <= LARGEST_BALL)) return Number.NaN;
    }
    return Number.NaN;
  }

  /** The most by which a voltage may be off, seen from the rounded voltages, which are what is kept. */
  private widened(radius: number): number {
    const { low } = this.system.state;
    let most = 0;
    let heaviest = 0;
    for (let j = 0; j < this.isVoltage.length; j++) {
      if (!this.isVoltage[j]) continue;
      most = Math.max(most, Math.abs(low[j]!));
      heaviest = Math.max(heaviest, this.weights[j]!);
    }
    return (radius * heaviest + most) * WIDENED;
  }

  private attempt(ball: number, most: number): Found {
    const { bounds, weights, spread, isVoltage, parts, widths } = this;
    const { state } = this.system;
    spread.fill(0);
    widths.measure(weights);
    for (let k = 0, at = 0; k < parts.length; k++) {
      const part = parts[k]!;
      part.addSpread(state, ball, widths.values, at, spread);
      at += part.gaps.length;
    }
    bounds.bound(state.jacobian, weights, this.doubts.roundings, this.doubts.values, spread);
    const { left, error, change } = bounds;
    let radius = LEAST_RADIUS;
    let fits = true;
    for (let i = 0; i < isVoltage.length; i++) {
      if (!isVoltage[i]) continue;
      const weight = weights[i]!;
      const moved = (left[i]! + change[i]!) * WIDENED;
      if (most === 1 && moved >= WORN * weight && SPARE * moved <= 1) {
        // A net that hardly errs by itself is moved by others, and is given room for that.
        weights[i] = SPARE * moved;
        fits = false;
        continue;
      }
      if (!(left[i]! < most * weight)) return FAR;
      const share = weight - moved;
      if (!(share > 0)) return change[i]! > left[i]! ? LARGE : FAR;
      const needed = (error[i]! / share) * WIDENED;
      if (needed > radius) radius = needed;
    }
    if (!(radius < Number.POSITIVE_INFINITY)) return FAR;
    if (radius > ball) return { kind: "ball too small", radius };
    for (let i = 0; i < isVoltage.length; i++) {
      if (isVoltage[i]) continue;
      const needed = (error[i]! / radius + left[i]! + change[i]!) * WIDENED;
      if (needed < weights[i]!) continue;
      if (!(needed < Number.POSITIVE_INFINITY)) return FAR;
      weights[i] = Math.max(SPARE * needed, LEAST_CURRENT_WEIGHT);
      fits = false;
    }
    if (!fits) bounds.reweigh();
    for (let gap = 0; gap < widths.values.length; gap++) {
      if (!widths.isHeld(gap)) continue;
      const row = isVoltage.length + gap;
      const needed = (error[row]! / radius + left[row]! + change[row]!) * WIDENED;
      if (needed < widths.values[gap]!) continue;
      widths.hold(gap, SPARE * needed);
      fits = false;
    }
    return fits ? { kind: "proved", radius } : { kind: "weights too small" };
  }
}

type Found =
  | { readonly kind: "proved" | "ball too small"; readonly radius: number }
  | { readonly kind: "weights too small" | "ball too large" | "inverse too far" };

const FAR: Found = { kind: "inverse too far" };
const LARGE: Found = { kind: "ball too large" };
