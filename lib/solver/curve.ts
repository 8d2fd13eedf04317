import { advance } from "@/lib/circuit/state";
import type { System } from "@/lib/circuit/system";
import type { SparseShape } from "./elimination";
import { LinearSolver } from "./linear";

/** A system with one parameter: F(x, p) = 0 is a curve. `parameter` is in units of which 1 is a fair step, as 1 V is for a voltage. */
export interface Curved {
  readonly shape: SparseShape;
  /** Sets the parameter. */
  turn(parameter: number): void;
  /** Puts F into the state's residual, ∂F/∂p into `slope`, and gives ∂F/∂x in the places of `shape`, at the present unknowns. */
  linearise(slope: Float64Array): Float64Array;
}

/** Newton steps that bring a predicted point back to the curve. */
const CORRECTIONS = 8;
/** V, and units of the parameter: a point nearer to the curve counts as on it. */
const CLOSE = 1e-7;
/** A correction that is longer than this has left its neighbourhood. */
const LOST = 2;
const SMALLEST_STEP = 1e-9;
/** A tangent turns by at most 45° from point to point, unless the step is short. */
const MOST_TURN = 0.3;
const SHORT = 1e-4;

/**
 * Follows the solutions of F(x, p) = 0 by their arclength, so that the parameter may turn back on the way (pseudo-arclength continuation;
 * Keller, in: Applications of Bifurcation Theory, 1977, from memory). The arc is measured over voltages and the parameter; currents follow.
 */
export class Curve {
  parameter = 0;
  /** Newton steps so far. */
  iterations = 0;
  /** Unit tangent: unknowns, then the parameter. */
  readonly tangent: Float64Array;
  private readonly size: number;
  private readonly isVoltage: readonly boolean[];
  private readonly linear: LinearSolver;
  private readonly values: Float64Array;
  private readonly inner: number;
  private readonly last: Float64Array;
  private readonly slope: Float64Array;
  private readonly right: Float64Array;
  private readonly step: Float64Array;
  private readonly x: Float64Array;
  private readonly low: Float64Array;

  /** Begins at the solution at hand, towards a rising (`+1`) or falling parameter. */
  constructor(
    private readonly system: System,
    private readonly curved: Curved,
    parameter: number,
    sense: 1 | -1,
  ) {
    const { circuit } = system;
    const { shape } = curved;
    this.size = circuit.size;
    this.isVoltage = circuit.unknowns.map(({ unit }) => unit === "V");
    const rows = Array.from(shape.rows);
    const columns = Array.from(shape.columns);
    this.inner = rows.length;
    for (let i = 0; i < this.size; i++) {
      rows.push(i, this.size);
      columns.push(this.size, i);
    }
    rows.push(this.size);
    columns.push(this.size);
    const bordered = { size: this.size + 1, rows: Int32Array.from(rows), columns: Int32Array.from(columns) };
    const vector = () => new Float64Array(this.size + 1);
    this.values = new Float64Array(rows.length);
    this.tangent = vector();
    this.last = vector();
    this.slope = vector();
    this.right = vector();
    this.step = vector();
    this.x = vector();
    this.low = vector();
    this.parameter = parameter;
    this.tangent[this.size] = sense;
    this.assemble();
    this.linear = new LinearSolver(bordered, this.values);
    this.aim();
  }

  /** ∂p/∂s. */
  get rise(): number {
    return this.tangent[this.size]!;
  }

  /**
   * Goes a length along the curve; false, with everything as it was, where no point of the curve is found there or where its tangent
   * has turned so far that it may be another part of the curve.
   */
  go(length: number): boolean {
    const { system, tangent, step, right, size, x, low, last } = this;
    const { state } = system;
    const before = this.parameter;
    x.set(state.x);
    low.set(state.low);
    last.set(tangent);
    for (let j = 0; j < size; j++) step[j] = length * tangent[j]!;
    advance(state, step);
    this.parameter = before + length * this.rise;
    for (let n = 0; n < CORRECTIONS; n++) {
      this.iterations += 1;
      this.assemble();
      right.set(state.residual.subarray(0, size));
      right[size] = 0;
      if (!this.linear.solve(this.values, right, step)) break;
      const far = this.longest();
      if (!(far < LOST)) break;
      advance(state, step);
      this.parameter += step[size]!;
      if (far > CLOSE) continue;
      this.assemble();
      if (this.aim() && (this.turned() < MOST_TURN || Math.abs(length) < SHORT)) return true;
      break;
    }
    state.x.set(x);
    state.low.set(low);
    tangent.set(last);
    this.parameter = before;
    return false;
  }

  /** Goes at most a length, shorter where the curve bends; the length gone, or 0 where it is lost. */
  stride(length: number): number {
    for (let by = length; Math.abs(by) > SMALLEST_STEP; by /= 4) if (this.go(by)) return by;
    return 0;
  }

  private assemble(): void {
    const { system, curved, values, slope, size, inner, tangent } = this;
    curved.turn(this.parameter);
    system.settle();
    values.set(curved.linearise(slope));
    for (let i = 0, at = inner; i < size; i++) {
      values[at++] = slope[i]!;
      values[at++] = this.isVoltage[i] ? tangent[i]! : 0;
    }
    values[values.length - 1] = tangent[size]!;
  }

  /** The tangent at the point at hand, on the side of the last one. */
  private aim(): boolean {
    const { right, step, tangent, size } = this;
    right.fill(0);
    right[size] = -1;
    if (!this.linear.solve(this.values, right, step)) return false;
    const long = Math.sqrt(this.product(step, step));
    for (let j = 0; j <= size; j++) tangent[j] = step[j]! / long;
    return true;
  }

  /** 1 − the cosine of the angle between the last tangent and this one. */
  private turned(): number {
    return 1 - this.product(this.last, this.tangent);
  }

  /** Over voltages and the parameter. */
  private product(a: Float64Array, b: Float64Array): number {
    let sum = a[this.size]! * b[this.size]!;
    for (let j = 0; j < this.size; j++) if (this.isVoltage[j]) sum += a[j]! * b[j]!;
    return sum;
  }

  /** The largest of the step's parts over voltages and the parameter. */
  private longest(): number {
    let most = Math.abs(this.step[this.size]!);
    for (let j = 0; j < this.size; j++) {
      const one = this.isVoltage[j] ? Math.abs(this.step[j]!) : 0;
      if (!(one <= most)) most = one;
    }
    return most;
  }
}
