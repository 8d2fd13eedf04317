import type { System } from "@/lib/circuit/system";
import type { SparseShape } from "./elimination";
import { type Factors, type Linear, LinearSolver } from "./linear";
import type { Bench } from "./newton";

/**
 * The system with an aid that is turned on and off: a conductance from every net to a fixed voltage of its own, and for every amplifier
 * a lag of its output behind its inputs. Its residual is F(x) + g·(D·(x − origin)), D 1 at a net and −1 S⁻¹ from an amplifier's law to its
 * output; where x and origin are neighbours in time, that is a capacitor at every net and a slow amplifier.
 */
export class Aided implements Linear {
  /** g, S. */
  conductance = 0;
  /** V, one an unknown. */
  readonly origin: Float64Array;
  readonly shape: SparseShape;
  /** Rows and columns of D with its entries, and their places among the values. */
  readonly aids: readonly { row: number; column: number; sign: number; place: number }[];
  private readonly values: Float64Array;
  private readonly linear: LinearSolver;

  /** Off. The pivots are chosen on a cold start, so that they do not depend on what was solved before. */
  constructor(private readonly system: System) {
    const { circuit, pattern, parts, state } = system;
    const rows = Array.from(pattern.rows);
    const columns = Array.from(pattern.columns);
    const known = new Map(rows.map((row, place) => [`${row} ${columns[place]}`, place]));
    const nets = circuit.unknowns.length - circuit.branchNets.length;
    const wanted: [number, number, number][] = Array.from({ length: nets }, (_, i) => [i, i, 1]);
    for (const { element } of parts) {
      if (element.kind !== "opamp") continue;
      wanted.push([circuit.branches.get(element.name)!, circuit.nets.get(element.pins.out!)!, -1]);
    }
    this.aids = wanted.map(([row, column, sign]) => {
      let place = known.get(`${row} ${column}`);
      if (place === undefined) {
        place = rows.push(row) - 1;
        columns.push(column);
      }
      return { row, column, sign, place };
    });
    this.shape = { size: circuit.size, rows: Int32Array.from(rows), columns: Int32Array.from(columns) };
    this.values = new Float64Array(rows.length);
    this.origin = new Float64Array(circuit.size);
    system.startCold();
    system.assemble();
    this.conductance = 1;
    this.linear = new LinearSolver(this.shape, this.aidedValues(state.jacobian));
    this.conductance = 0;
  }

  solve(jacobian: Float64Array, residual: Float64Array, step: Float64Array): boolean {
    return this.linear.solve(this.aidedValues(jacobian), residual, step);
  }

  solveAgain(residual: Float64Array, step: Float64Array): void {
    this.linear.solveAgain(residual, step);
  }

  solveTransposed(right: Float64Array, solution: Float64Array): void {
    this.linear.solveTransposed(right, solution);
  }

  /** The factors of the last matrix that was solved, with the aid as it was then. */
  get atHand(): Factors | null {
    return this.linear.atHand;
  }

  /** Goes back to the pivots of the cold start. */
  reset(): void {
    this.linear.reset();
  }

  /** The aid's current at each net. */
  pull(k: number): number {
    const { column, sign } = this.aids[k]!;
    const { x, low } = this.system.state;
    return sign * (x[column]! - this.origin[column]! + low[column]!);
  }

  /** A bench on which the aid helps: its currents go into every residual, its slopes into every Jacobian. */
  bench(step: Float64Array): Bench {
    return { system: this.system, linear: this, step, assemble: (isAtRest) => this.assemble(isAtRest) };
  }

  assemble(isAtRest = false): void {
    const { system } = this;
    if (isAtRest) system.assembleAtRest();
    else system.assemble();
    const { residual, scale } = system.state;
    for (let k = 0; k < this.aids.length; k++) {
      const amperes = this.conductance * this.pull(k);
      residual[this.aids[k]!.row]! += amperes;
      scale[this.aids[k]!.row]! += Math.abs(amperes);
    }
  }

  /** The Jacobian at hand with the aid's slopes, in the places of `shape`. */
  aidedValues(jacobian: Float64Array): Float64Array {
    const { values, aids, conductance } = this;
    values.fill(0, jacobian.length);
    values.set(jacobian);
    for (const { place, sign } of aids) values[place]! += sign * conductance;
    return values;
  }
}
