import type { Element, Signal, Typed } from "@/lib/language/ast";
import { differentiate } from "@/lib/language/differentiate";
import { evaluate, type Scope } from "@/lib/language/evaluate";
import { evaluateInterval, type Interval, type IntervalScope } from "@/lib/language/interval";
import { KINDS } from "@/lib/language/kinds";
import { signalName, signalsOf } from "@/lib/language/signals-of";
import { branchAt, type Circuit } from "./circuit";
import { nodesOf, pinCurrent } from "./law-signals";
import type { State } from "./state";
import type { PointValues } from "./values";

/** Where a signal is found among the unknowns: one of them, with its sign, or the difference of two. */
interface Source {
  readonly from: number;
  readonly sign: 1 | -1;
  /** The number that is taken off; that of ground where there is none. */
  readonly less: number;
}

function sourceOf(signal: Signal, circuit: Circuit, elements: ReadonlyMap<string, Element>): Source {
  const { nets, size } = circuit;
  if (signal.of === "net") return { from: nets.get(signal.net)!, sign: 1, less: size };
  const element = elements.get(signal.element)!;
  const current = pinCurrent(signal, element.kind);
  if (current !== null) {
    const { number, sign } = branchAt(circuit, element, current.pin)!;
    return { from: number, sign, less: size };
  }
  const [first, second] = KINDS[element.kind].pins as [string, string];
  return { from: nets.get(element.pins[first]!)!, sign: 1, less: nets.get(element.pins[second]!)! };
}

/** The expression of a law, with one slope for each of its signals, at values of the signals that are given. */
export class LawExpression {
  readonly movers: ReadonlySet<string>;
  readonly sources: readonly Source[];
  private readonly value: Typed;
  private readonly slopes: readonly Typed[];
  private readonly numbers = new Map<Signal, number>();
  private readonly names = new Map<string, "knob" | "let">();
  private readonly figures = new Map<string, number>();
  private readonly scope: Scope & { thermalVoltage: number };
  private at: Float64Array = new Float64Array(0);
  /** As `scope`, with each signal within `around` of where it is. */
  private readonly ranges: IntervalScope;
  private readonly rangesOfSlopes: IntervalScope;
  private around: Float64Array = new Float64Array(0);

  constructor(law: Typed, circuit: Circuit, elements: ReadonlyMap<string, Element>, values: PointValues) {
    this.value = law;
    const signals = signalsOf(this.value);
    this.slopes = signals.map((signal) => differentiate(this.value, signal));
    this.sources = signals.map((signal) => sourceOf(signal, circuit, elements));
    this.movers = values.moversOf(law);
    const order = new Map(signals.map((signal, k) => [signalName(signal), k]));
    for (const typed of [this.value, ...this.slopes]) {
      for (const node of nodesOf(typed)) {
        if (node.op === "signal") this.numbers.set(node.signal, order.get(signalName(node.signal))!);
        else if (node.op === "knob" || node.op === "let") this.names.set(node.name, node.op);
      }
    }
    this.scope = {
      knob: (name) => this.figures.get(name)!,
      let: (name) => this.figures.get(name)!,
      signal: (signal) => this.at[this.numbers.get(signal)!]!,
      thermalVoltage: 0,
    };
    const { scope } = this;
    this.ranges = {
      knob: scope.knob,
      let: scope.let,
      signal: (signal) => {
        const k = this.numbers.get(signal)!;
        return { low: this.at[k]! - this.around[k]!, high: this.at[k]! + this.around[k]! };
      },
      get thermalVoltage() {
        return scope.thermalVoltage;
      },
    };
    const { ranges } = this;
    this.rangesOfSlopes = {
      ...ranges,
      isContinuous: true,
      get thermalVoltage() {
        return scope.thermalVoltage;
      },
    };
  }

  /** Where the value lies while each signal stays within `around` of `signals`, rounding included. */
  valueRange(signals: Float64Array, around: Float64Array): Interval {
    this.at = signals;
    this.around = around;
    return evaluateInterval(this.value, this.ranges);
  }

  /** Where the slope by signal `k` lies likewise; at a kink, where a value has no jump, between those of both sides. */
  slopeRange(k: number, signals: Float64Array, around: Float64Array): Interval {
    this.at = signals;
    this.around = around;
    const range = evaluateInterval(this.slopes[k]!, this.ranges);
    if (isBounded(range) || !isBounded(evaluateInterval(this.value, this.ranges))) return range;
    return evaluateInterval(this.slopes[k]!, this.rangesOfSlopes);
  }

  /** Reads the knobs and values of the law as they are for its element now. */
  read(values: PointValues): void {
    for (const [name, op] of this.names) {
      this.figures.set(name, op === "knob" ? values.knob(name) : values.let(name));
    }
    this.scope.thermalVoltage = values.thermalVoltage;
  }

  /** The signals at the present unknowns. */
  measure({ x, low }: State, into: Float64Array): void {
    const { sources } = this;
    for (let k = 0; k < sources.length; k++) {
      const { from, sign, less } = sources[k]!;
      into[k] = sign * (x[from]! - x[less]! + (low[from]! - low[less]!));
    }
  }

  valueAt(signals: Float64Array): number {
    this.at = signals;
    return evaluate(this.value, this.scope);
  }

  slopesAt(signals: Float64Array, into: Float64Array): void {
    this.at = signals;
    for (let k = 0; k < into.length; k++) into[k] = evaluate(this.slopes[k]!, this.scope);
  }
}

function isBounded({ low, high }: Interval): boolean {
  return Number.isFinite(low) && Number.isFinite(high);
}
