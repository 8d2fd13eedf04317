import type { System } from "@/lib/circuit/system";
import { Aided } from "./aided";
import { Certificate } from "./certificate";
import { deflated } from "./deflation";
import { Ladder } from "./ladder";
import { LinearSolver } from "./linear";
import { type Bench, newton } from "./newton";
import { partner } from "./partner";
import { tied } from "./shunt-ramp";
import { type Judged, Stability } from "./stability";

/** One operating point of a circuit at one setting. */
export interface OperatingPoint extends Judged {
  /** In the order of the circuit's unknowns. */
  readonly x: Float64Array;
  /** V; NaN where not proved. */
  readonly bound: number;
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
/** Ways in which the known points are paired with others. */
const PAIRINGS = 3;
const NEWTON_STEPS = 40;
/** V: how far around a known point its own neighbourhood is searched. */
const BESIDE = 0.2;
/** V: solutions that are closer, and not proved apart, are one. */
const SAME = 1e-7;
/** Looks for up to `most` operating points at the setting to which the system is turned, by deflation and scattered starts. */
export function seek(system: System, most: number): Sought {
  return new Seeker(system).seek(most);
}

/** Looks for the operating points of a system, at one setting after another; what it finds depends on the setting alone. */
export class Seeker {
  private readonly bench: Bench;
  private readonly linear: LinearSolver;
  private readonly aided: Aided;
  private readonly ladder: Ladder;
  private readonly certificate: Certificate;
  private points: OperatingPoint[] = [];
  private readonly spent = { iterations: 0 };
  private readonly nets: number;
  private readonly stability: Stability;
  private seed = 1;
  /** V: what scattered starts span; more where solutions do. */
  private low = -1;
  private high = 1;

  constructor(private readonly system: System) {
    const { circuit, pattern, state } = system;
    this.aided = new Aided(system);
    this.ladder = new Ladder(system, false);
    this.linear = new LinearSolver(pattern, state.jacobian);
    this.bench = {
      system,
      linear: this.linear,
      step: new Float64Array(circuit.size),
      assemble: () => system.assemble(),
    };
    this.certificate = new Certificate(system, this.linear);
    this.stability = new Stability(system, this.linear, this.aided);
    this.nets = circuit.unknowns.filter(({ unit }) => unit === "V").length;
  }

  /** Looks for up to `most` points, of which some may be known. */
  seek(most: number, known: readonly OperatingPoint[] = []): Sought {
    this.points = [...known];
    this.spent.iterations = 0;
    this.seed = 1;
    [this.low, this.high] = [-1, 1];
    this.ladder.reset();
    this.linear.reset();
    this.aided.reset();
    const outcome = this.ladder.solve(false);
    this.spent.iterations += outcome.iterations;
    if (outcome.kind === "converged") this.keep();
    let quiet = 0;
    for (let k = 0; this.points.length < most && quiet < (this.sum === 1 ? QUIET : RESTLESS); k++) {
      quiet = this.start(k) ? 0 : quiet + 1;
      if (quiet === QUIET && this.pair(most)) quiet = 0;
    }
    const points = this.points.toSorted(inOrder);
    return { points, isComplete: this.sum === 1, iterations: this.spent.iterations };
  }

  /** Settles from the present unknowns; null where that comes to nothing. */
  arrive(): OperatingPoint | null {
    const { system, bench } = this;
    const { state } = system;
    system.settle();
    const attempt = newton(bench, true, NEWTON_STEPS);
    this.spent.iterations += attempt.iterations;
    if (attempt.kind !== "converged") return null;
    this.certificate.reset();
    return { x: state.x.slice(0, -1), bound: this.certificate.prove(), ...this.stability.judge() };
  }

  /** Whether two points are one: within what is proved of both, or very close where nothing is. */
  isSame(a: OperatingPoint, b: OperatingPoint): boolean {
    let apart = 0;
    for (let j = 0; j < this.nets; j++) apart = Math.max(apart, Math.abs(a.x[j]! - b.x[j]!));
    return Number.isNaN(a.bound + b.bound) ? apart < SAME : apart <= a.bound + b.bound + Number.EPSILON;
  }

  private get sum(): number {
    return this.points.reduce((sum, { index }) => sum + index, 0);
  }

  /**
   * Four kinds of start in turn: held at scattered voltages, midway between known points, scattered, and beside a known point. True
   * where it leads to a new point.
   */
  private start(k: number): boolean {
    const { state } = this.system;
    const kind = k % 4;
    const [one, other] = [this.pick(), this.pick()];
    state.low.fill(0);
    if (kind === 0) {
      for (let j = 0; j < this.nets; j++) this.aided.origin[j] = this.scattered();
      this.spent.iterations += tied(this.bench, this.aided).iterations;
      return this.keep();
    }
    state.x.fill(0);
    const share = 0.25 + 0.5 * this.next();
    for (let j = 0; j < this.bench.step.length; j++) {
      const isNet = j < this.nets;
      if (one === undefined || other === undefined || kind === 2) state.x[j] = isNet ? this.scattered() : 0;
      else if (kind === 1) state.x[j] = share * one.x[j]! + (1 - share) * other.x[j]!;
      else state.x[j] = one.x[j]! + (isNet ? BESIDE * (this.next() - 0.5) : 0);
    }
    const known = this.points.map(({ x }) => x);
    return deflated(this.bench, known, this.spent) && this.keep();
  }

  /** Follows the curves that lead from the known points to their partners; true where one was new. */
  private pair(most: number): boolean {
    const { state } = this.system;
    const before = this.points.length;
    // A single point whose index is 1 has no partner.
    if (before === 1 && this.sum === 1) return false;
    for (let variant = 0; variant < PAIRINGS; variant++) {
      for (const point of this.points) {
        if (this.points.length >= most) return this.points.length > before;
        state.x.set(point.x);
        state.low.fill(0);
        if (partner(this.bench, this.aided, variant, this.spent)) this.keep();
      }
    }
    return this.points.length > before;
  }

  /** Keeps where the present unknowns settle, if that is a point that is not known. */
  private keep(): boolean {
    const found = this.arrive();
    if (found === null || this.points.some((known) => this.isSame(known, found))) return false;
    for (let j = 0; j < this.nets; j++) {
      this.low = Math.min(this.low, found.x[j]!);
      this.high = Math.max(this.high, found.x[j]!);
    }
    this.points.push(found);
    return true;
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
