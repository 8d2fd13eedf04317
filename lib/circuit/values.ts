import type { Design, NamedValue, Tolerance, Typed } from "@/lib/language/ast";
import { evaluate, type Scope } from "@/lib/language/evaluate";
import { thermalVoltage } from "@/lib/units/constants";

/** What moves with V_T: a value that reads it moves with this knob. */
export const TEMPERATURE = "temperature";

/**
 * One draw of every tolerance. `shift` is how far the value `name` of a part lies from `nominal`: a let or knob by its name, a
 * value of the part's own or its model's as `.name`. Each part draws for itself.
 */
export interface Draw {
  shift(part: string, name: string, tolerance: Tolerance, nominal: number): number;
}

/**
 * Knobs and lets at the point being solved, coherent SI values. They are nominal but for a part that reads its figures: to it
 * they are as drawn.
 */
export class PointValues implements Scope {
  private readonly knobs = new Map<string, number>();
  private readonly lets = new Map<string, number>();
  private readonly movers = new Map<string, ReadonlySet<string>>();
  private readonly named: readonly NamedValue[];
  /** Tolerances of knobs. */
  private readonly tolerances: ReadonlyMap<string, Tolerance | null>;
  /** Lets with a tolerance, their own or of what they are made of. */
  private readonly loose = new Map<string, NamedValue>();
  private draw: Draw | null = null;
  /** The part that reads its figures; null outside parts. */
  private part: string | null = null;
  thermalVoltage = 0;

  constructor(design: Design) {
    this.named = design.lets;
    for (const { name, value } of design.knobs) {
      if (value.op === "constant") this.knobs.set(name, value.value);
      this.movers.set(name, new Set([name]));
    }
    for (const { name, value } of design.lets) this.movers.set(name, this.moversOf(value));
    this.tolerances = new Map(design.knobs.map(({ name, tolerance }) => [name, tolerance]));
    const isLoose = (name: string) => this.loose.has(name) || (this.tolerances.get(name) ?? null) !== null;
    for (const one of design.lets) {
      if (one.tolerance !== null || uses(one.value, isLoose)) this.loose.set(one.name, one);
    }
    this.refresh(null);
  }

  /** The ambient temperature, one for all parts. */
  get kelvin(): number {
    return this.knobs.get(TEMPERATURE)!;
  }

  knob(name: string): number {
    const nominal = this.knobs.get(name)!;
    return this.part === null ? nominal : this.shifted(name, this.tolerances.get(name), nominal);
  }

  let(name: string): number {
    const loose = this.part === null ? undefined : this.loose.get(name);
    if (loose === undefined) return this.lets.get(name)!;
    return this.shifted(name, loose.tolerance, evaluate(loose.value, this));
  }

  /** Draws the tolerances anew, nominal for null; parts must then read their figures again. */
  use(draw: Draw | null): void {
    this.draw = draw;
  }

  /** While `read` runs, values are as drawn for the part. */
  within(part: string, read: () => void): void {
    this.part = this.draw === null ? null : part;
    read();
    this.part = null;
  }

  private shifted(name: string, tolerance: Tolerance | null | undefined, nominal: number): number {
    if (!tolerance || this.part === null || this.draw === null) return nominal;
    return nominal + this.draw.shift(this.part, name, tolerance, nominal);
  }

  /** Signals are no part of a parameter. */
  signal(): number {
    return Number.NaN;
  }

  /** A value of a part or its model. */
  of({ name, value, tolerance }: NamedValue): number {
    const nominal = evaluate(value, this);
    return tolerance === null ? nominal : this.shifted(`.${name}`, tolerance, nominal);
  }

  /** Turns one knob and works out again what moves with it. */
  turn(knob: string, value: number): void {
    if (this.knobs.get(knob) === value) return;
    this.knobs.set(knob, value);
    this.refresh(knob);
  }

  private refresh(knob: string | null): void {
    this.thermalVoltage = thermalVoltage(this.kelvin);
    for (const one of this.named) {
      if (knob === null || this.movers.get(one.name)!.has(knob))
        this.lets.set(one.name, evaluate(one.value, this));
    }
  }

  /** The knobs on which a value depends, through lets too. */
  moversOf(typed: Typed): ReadonlySet<string> {
    const found = new Set<string>();
    this.collect(typed, found);
    return found;
  }

  private collect(typed: Typed, into: Set<string>): void {
    switch (typed.op) {
      case "constant":
      case "signal":
      case "trace":
      case "reading":
        return;
      case "reduce":
        for (const arg of typed.args) this.collect(arg, into);
        return;
      case "knob":
      case "let":
        for (const mover of this.movers.get(typed.name)!) into.add(mover);
        return;
      case "thermal voltage":
        into.add(TEMPERATURE);
        return;
      case "negate":
        this.collect(typed.operand, into);
        return;
      case "call":
        for (const arg of typed.args) this.collect(arg, into);
        return;
      default:
        this.collect(typed.left, into);
        this.collect(typed.right, into);
    }
  }
}

/** Whether an expression names a let or knob for which `test` holds. */
function uses(typed: Typed, test: (name: string) => boolean): boolean {
  switch (typed.op) {
    case "knob":
    case "let":
      return test(typed.name);
    case "negate":
      return uses(typed.operand, test);
    case "call":
    case "reduce":
      return typed.args.some((arg) => uses(arg, test));
    case "constant":
    case "signal":
    case "trace":
    case "reading":
    case "thermal voltage":
      return false;
    default:
      return uses(typed.left, test) || uses(typed.right, test);
  }
}
