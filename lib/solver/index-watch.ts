import type { System } from "@/lib/circuit/system";
import { Aided } from "./aided";
import type { Factors, LinearSolver } from "./linear";

/** S: holds every net, so that the sign of det J is that of a circuit with one solution. */
const HELD = 1e6;
/** Unknowns of a circuit that is watched: beyond, the matrix of the held circuit would be felt at the start. */
const MOST_UNKNOWNS = 300;

type Sign = 1 | -1 | 0;

/**
 * Watches the index of solved points: the sign of det J against that of the circuit with every net held and amplifiers slow. Where they
 * differ, an odd number of modes grows, and the circuit would leave the point; where they agree, it may still be unstable by two
 * modes at once, which only `seek` looks at. The sign is that of the pivots of factors at hand, so that a sound point costs next to nothing.
 */
export class IndexWatch {
  private readonly held: Aided | null;
  private readonly step: Float64Array;
  /** The sign of sound points of this strand; 0 before one is known. */
  private sound: Sign = 0;

  /** The system must stand at a cold start, and is left there. */
  constructor(
    private readonly system: System,
    private readonly linear: LinearSolver,
  ) {
    const { size } = system.circuit;
    this.held = size <= MOST_UNKNOWNS ? new Aided(system) : null;
    this.step = new Float64Array(size);
  }

  /** Forgets the neighbour, at the beginning of a strand. */
  reset(): void {
    this.sound = 0;
    this.held?.reset();
  }

  /** Whether the point to which the linear solver was last applied has an odd number of growing modes; false too where that is not known. */
  isOdd(): boolean {
    if (this.held === null) return false;
    const here = signOf(this.linear.atHand);
    if (here === 0 || here === this.sound) return false;
    const sound = heldSign(this.system, this.held, this.step);
    if (sound === here) this.sound = here;
    return sound === -here;
  }
}

/** The sign of det J with every net held and amplifiers slow, at the Jacobian at hand; 0 where it is not had. */
export function heldSign({ state }: System, held: Aided, step: Float64Array): Sign {
  held.conductance = HELD;
  const isSolved = held.solve(state.jacobian, state.residual, step);
  held.conductance = 0;
  return isSolved ? signOf(held.atHand) : 0;
}

/** The sign of a determinant by its factors: that of the pivots and of the order in which they were taken. 0 without factors. */
export function signOf(factors: Factors | null): Sign {
  if (factors === null) return 0;
  const { plan, values } = factors;
  let sign: Sign = plan.parity;
  for (let k = 0; k < plan.pivots.length; k++) if (values[plan.places + k]! < 0) sign = sign === 1 ? -1 : 1;
  return sign;
}
