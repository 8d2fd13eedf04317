import type { Element, Model, NamedValue } from "@/lib/language/ast";
import { KINDS } from "@/lib/language/kinds";
import type { Circuit } from "./circuit";
import type { Tables } from "./frame";
import type { Pattern } from "./pattern";
import type { State } from "./state";
import type { PointValues } from "./values";

/** An element as the solver sees it: it reads its figures at a point, and adds its currents and slopes to the system. */
export interface Part {
  readonly element: Element;
  /** Knobs that its figures follow; `temperature` where its law does. */
  readonly movers: ReadonlySet<string>;
  /** Reads its figures at a point. */
  read(values: PointValues): void;
  /** Adds the slopes that do not depend on the unknowns. */
  addConstantSlopes(jacobian: Float64Array): void;
  /** Adds its currents or mismatch to the residual and, where they depend on the unknowns, its slopes. */
  addTo(state: State): void;
  /** A loop over the table of its kind adds it, and not `addTo`. */
  readonly isPlain?: boolean;
  /** The current into a pin, A, at the present unknowns. */
  current(pin: string, state: State): number;
  /**
   * What the certificate needs. "linear": constant slopes, and every figure within 8 roundings of what it adds to the scale.
   * A part that leaves it out is sound but leaves its points unproved.
   */
  readonly proof?: "linear" | Proof;
}

export type Gap = readonly [number, number];

/**
 * What the certificate asks of a law that is not linear, right after `settle` and `addTo`. Vectors have the entries of a State's.
 */
export interface Proof {
  /** The numbers of the unknowns between which lie the differences on which its slopes depend; ground for a single one. */
  readonly gaps: readonly Gap[];
  /** Adds, row by row, the most by which the law as computed may be off by rounding: A of a net, V of a branch law. */
  addDoubt(state: State, doubt: Float64Array): void;
  /**
   * Adds, row by row, the most by which the sum of slope·change can change while every gap k moves by at most widths[at + k]·radius, counted
   * from the slopes as computed: Σ_k sup|slope_ik − as computed|·widths[at + k]. Widths are V per V of a gap between nets, A per V of a
   * branch current.
   */
  addSpread(state: State, radius: number, widths: Float64Array, at: number, spread: Float64Array): void;
}

/** A part with junctions, which are linearised at voltages of their own while a step is limited. */
export interface JunctionPart extends Part {
  /** Linearises where a solution from nothing starts: a forward junction at 1 µA. */
  start(): void;
  /** Linearises at the actual voltages. */
  settle(state: State): void;
  /** Linearises where the junction step leads from the last voltages towards the actual ones; true where these are the same. */
  follow(state: State): boolean;
  /** How far linearisation and actual voltages stand apart, in units of n·V_T. */
  apart(state: State): number;
}

/** Where a cold start linearises a forward junction, A: within three decades of most currents of log-domain work. */
export const START_CURRENT = 1e-6;

/** A junction step that is shorter, in units of n·V_T, needs no limit: Newton's own error is then below 1 %. */
export const FREE = 0.1;

/** A limited step that is this close to the whole one, in units of n·V_T, is taken whole. */
export const NEARLY_WHOLE = 0.01;

/** What a part is made from. */
export interface Bench {
  readonly element: Element;
  readonly model: Model | null;
  readonly circuit: Circuit;
  readonly pattern: Pattern;
  readonly values: PointValues;
  readonly tables: Tables;
}

/** The number of the voltage at a pin: that of its net, or of the inner end of what lies between. */
export function netAt({ circuit, element }: Bench, pin: string): number {
  return circuit.terminals.get(`${element.name}.${pin}`)?.inner ?? circuit.nets.get(element.pins[pin]!)!;
}

/**
 * The value of a parameter of a model or an element at a point, null where it is left out. NaN where a knob has led it out of
 * its bounds, so that the point fails: the checker bounds it at the knobs' defaults only.
 */
export function figureOf(
  { kind, params }: Pick<Model | Element, "kind" | "params">,
  name: string,
  values: PointValues,
): number | null {
  const given = params.get(name);
  if (given === undefined) return null;
  const value = values.of(given);
  const { low, high, open } = KINDS[kind].parameters[name]!;
  if (low !== undefined && (open ? value <= low : value < low)) return Number.NaN;
  if (high !== undefined && (open ? value >= high : value > high)) return Number.NaN;
  return value;
}

/** The knobs that any of the parameters follow. */
export function moversOf(params: Iterable<NamedValue>, values: PointValues, ...more: string[]): Set<string> {
  const movers = new Set(more);
  for (const { value } of params) for (const mover of values.moversOf(value)) movers.add(mover);
  return movers;
}
