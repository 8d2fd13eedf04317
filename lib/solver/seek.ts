import type { System } from "@/lib/circuit/system";
import { Aided } from "./aided";
import { Certificate } from "./certificate";
import { deflated } from "./deflation";
import { type Index, indexOf } from "./dense";
import type { SparseShape } from "./elimination";
import { Ladder } from "./ladder";
import { LinearSolver } from "./linear";
import { type Bench, newton } from "./newton";
import { tied } from "./shunt-ramp";

/** One operating point of a circuit at one setting. */
export interface OperatingPoint {
  /** In the order of the circuit's unknowns. */
  readonly x: Float64Array;
  /** V; NaN where not proved. */
  readonly bound: number;
  /** Whether it would stay, with a capacitor of one size at every net and amplifiers that are slow beside them. */
  readonly isStable: boolean;
  /** Sign of det J against that of the circuit with every net held; 0 where J is singular. */
  readonly index: 1 | 0 | -1;
}

export interface Sought {
  /** In the order of their voltages, the first unknown first. */
  readonly points: readonly OperatingPoint[];
  /** Whether the indices add up to 1, as those of all solutions do; where they do not, one is missing. */
  readonly isComplete: boolean;
  /** Linear systems solved. */
  readonly iterations: number;
}

/** Starts that find nothing new before the search ends, where the indices add up and where they do not. */
const QUIET = 12;
const RESTLESS = 60;
const NEWTON_STEPS = 40;
/** V: solutions that are closer, and not proved apart, are one. */
const SAME = 1e-7;
/** F at every net, beside 1 s of every amplifier. */
const CAPACITANCE = 1e-6;
/** S: holds every net, so that the sign of det J is that of a circuit with one solution. */
const HELD = 1e6;

/** Looks for up to `most` operating points at the setting to which the system is turned, by deflation and scattered starts. */
export function seek(system: System, most: number, first: readonly Float64Array[] = []): Sought {
  return new Search(system, most).run(first);
}

class Search {
  private readonly bench: Bench;
  private readonly shape: SparseShape;
  private readonly linear: LinearSolver;
  private readonly aided: Aided;
  private readonly certificate: Certificate;
  private readonly points: OperatingPoint[] = [];
  private readonly spent = { iterations: 0 };
  private readonly nets: number;
  /** D of D·dx/dt = −F: F at the nets, s at the amplifiers. */
  private readonly masses: { row: number; column: number; mass: number }[];
  private seed = 1;
  /** V: what scattered starts span; more where solutions do. */
  private low = -1;
  private high = 1;

  constructor(
    private readonly system: System,
    private readonly most: number,
  ) {
    const { circuit, pattern, state } = system;
    this.aided = new Aided(system);
    this.shape = {
      size: circuit.size,
      rows: Int32Array.from(pattern.rows),
      columns: Int32Array.from(pattern.columns),
    };
    this.linear = new LinearSolver(this.shape, state.jacobian);
    this.bench = {
      system,
      linear: this.linear,
      step: new Float64Array(circuit.size),
      assemble: () => system.assemble(),
    };
    this.certificate = new Certificate(system, this.linear);
    this.masses = this.aided.aids.map(({ row, column, sign }) => {
      return { row, column, mass: sign > 0 ? CAPACITANCE : -1 };
    });
    this.nets = circuit.unknowns.filter(({ unit }) => unit === "V").length;
  }

  run(first: readonly Float64Array[]): Sought {
    const outcome = new Ladder(this.system, false).solve(false);
    this.spent.iterations += outcome.iterations;
    if (outcome.kind === "converged") this.arrive();
    for (const start of first) this.from(start);
    let quiet = 0;
    for (let k = 0; this.points.length < this.most && quiet < (this.sum === 1 ? QUIET : RESTLESS); k++) {
      const before = this.points.length;
      this.start(k);
      quiet = this.points.length > before ? 0 : quiet + 1;
    }
    const points = this.points.toSorted(inOrder);
    return { points, isComplete: this.sum === 1, iterations: this.spent.iterations };
  }

  private get sum(): number {
    return this.points.reduce((sum, { index }) => sum + index, 0);
  }

  /** Four kinds of start in turn: held at scattered voltages, midway between known points, scattered, and beside a known point. */
  private start(k: number): void {
    const { state } = this.system;
    const kind = k % 4;
    const [one, other] = [this.pick(), this.pick()];
    state.low.fill(0);
    if (kind === 0) {
      for (let j = 0; j < this.nets; j++) this.aided.origin[j] = this.scattered();
      this.spent.iterations += tied(this.bench, this.aided).iterations;
      this.arrive();
      return;
    }
    state.x.fill(0);
    const share = 0.25 + 0.5 * this.next();
    for (let j = 0; j < this.bench.step.length; j++) {
      if (kind === 1 && one !== undefined) state.x[j] = share * one.x[j]! + (1 - share) * other!.x[j]!;
      else if (kind === 3 && one !== undefined)
        state.x[j] = one.x[j]! + (j < this.nets ? 0.2 * (this.next() - 0.5) : 0);
      else if (j < this.nets) state.x[j] = this.scattered();
    }
    if (
      deflated(
        this.bench,
        this.points.map(({ x }) => x),
        this.spent,
      )
    )
      this.arrive();
  }

  private from(start: Float64Array): void {
    this.system.state.x.set(start);
    this.system.state.low.fill(0);
    this.arrive();
  }

  /** Settles from the present unknowns and keeps where that ends, if it is a solution that is not known. */
  private arrive(): void {
    const { system, bench, points } = this;
    const { state } = system;
    system.settle();
    const attempt = newton(bench, true, NEWTON_STEPS);
    this.spent.iterations += attempt.iterations;
    if (attempt.kind !== "converged") return;
    const x = state.x.slice(0, -1);
    this.certificate.reset();
    const bound = this.certificate.prove();
    const isKnown = points.some((known) => {
      const apart = this.distance(known.x, x);
      return Number.isNaN(bound + known.bound) ? apart < SAME : apart <= bound + known.bound + Number.EPSILON;
    });
    if (isKnown) return;
    for (let j = 0; j < this.nets; j++) {
      this.low = Math.min(this.low, x[j]!);
      this.high = Math.max(this.high, x[j]!);
    }
    points.push({ x, bound, ...this.judge() });
  }

  private judge(): Pick<OperatingPoint, "isStable" | "index"> {
    const { aided, shape } = this;
    const { state } = this.system;
    const here = indexOf(shape, state.jacobian, this.masses);
    aided.conductance = HELD;
    const held: Index | null = indexOf(aided.shape, aided.aidedValues(state.jacobian), []);
    aided.conductance = 0;
    if (here === null || held === null) return { isStable: false, index: 0 };
    return { isStable: here.isStable && here.sign === held.sign, index: here.sign === held.sign ? 1 : -1 };
  }

  private distance(a: Float64Array, b: Float64Array): number {
    let most = 0;
    for (let j = 0; j < this.nets; j++) most = Math.max(most, Math.abs(a[j]! - b[j]!));
    return most;
  }

  private pick(): OperatingPoint | undefined {
    return this.points[Math.floor(this.next() * this.points.length)];
  }

  /** Within what known solutions span, and a fifth beyond. */
  private scattered(): number {
    const span = this.high - this.low;
    return this.low - 0.2 * span + 1.4 * span * this.next();
  }

  /** In [0, 1), the same at every setting (Lehmer's generator of 1951 with the multiplier 48271). */
  private next(): number {
    this.seed = (this.seed * 48271) % 2147483647;
    return this.seed / 2147483647;
  }
}

function inOrder(a: OperatingPoint, b: OperatingPoint): number {
  for (let j = 0; j < a.x.length; j++) {
    const apart = a.x[j]! - b.x[j]!;
    if (Math.abs(apart) > SAME) return apart;
  }
  return 0;
}
