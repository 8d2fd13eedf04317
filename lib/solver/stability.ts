import type { System } from "@/lib/circuit/system";
import type { Aided } from "./aided";
import { decays, type Index, indexOf } from "./dense";
import type { SparseShape } from "./elimination";
import { heldSign, signOf } from "./index-watch";
import type { LinearSolver } from "./linear";

/** F at every net, beside 1 s of every amplifier. */
const CAPACITANCE = 1e-6;

export interface Judged {
  /** Whether every mode decays, with a capacitor of one size at every net and amplifiers that are slow beside them. */
  readonly isStable: boolean;
  /** Sign of det J against that of the circuit with every net held; 0 where J is singular. */
  readonly index: 1 | 0 | -1;
}

/**
 * Judges operating points by the modes of D·dx/dt = −F(x) there. Those that are not 0 are eigenvalues of J⁻¹·D, of which only the columns of
 * unknowns with a mass are worked out, by the factors at hand.
 */
export class Stability {
  private readonly shape: SparseShape;
  /** Entries of D. */
  private readonly masses: readonly {
    readonly row: number;
    readonly column: number;
    readonly mass: number;
  }[];
  /** Unknowns in whose columns D has any. */
  private readonly moving: readonly number[];
  private readonly right: Float64Array;
  private readonly column: Float64Array;

  constructor(
    private readonly system: System,
    private readonly linear: LinearSolver,
    private readonly aided: Aided,
  ) {
    const { circuit, pattern } = system;
    this.shape = {
      size: circuit.size,
      rows: Int32Array.from(pattern.rows),
      columns: Int32Array.from(pattern.columns),
    };
    this.masses = aided.aids.map(({ row, column, sign }) => {
      return { row, column, mass: sign > 0 ? CAPACITANCE : -1 };
    });
    this.moving = [...new Set(this.masses.map(({ column }) => column))];
    this.right = new Float64Array(circuit.size + 1);
    this.column = new Float64Array(circuit.size);
  }

  /** The point to whose Jacobian the linear solver was last applied. */
  judge(): Judged {
    const held = heldSign(this.system, this.aided, this.column);
    const here = this.here(held);
    if (here === null || held === 0) return { isStable: false, index: 0 };
    const index = here.sign === held ? 1 : -1;
    return { isStable: index === 1 && here.isStable, index };
  }

  private here(held: 1 | -1 | 0): Index | null {
    const sign = signOf(this.linear.atHand);
    if (sign === 0) return indexOf(this.shape, this.system.state.jacobian, this.masses);
    // An odd number of modes grows, whichever they are.
    if (sign !== held) return { sign, isStable: false };
    if (decays(this.modes())) return { sign, isStable: true };
    // Modes that are 0 twice over are hurt most by rounding: what seems to grow is looked at again with interchanges and all unknowns.
    return indexOf(this.shape, this.system.state.jacobian, this.masses) ?? { sign, isStable: false };
  }

  /** J⁻¹·D without the rows and columns of unknowns that have no mass. */
  private modes(): number[][] {
    const { moving, masses, right, column } = this;
    const columns = moving.map((unknown) => {
      right.fill(0);
      for (const one of masses) if (one.column === unknown) right[one.row]! -= one.mass;
      this.linear.solveAgain(right, column);
      return moving.map((other) => column[other]!);
    });
    return moving.map((_, i) => columns.map((one) => one[i]!));
  }
}
