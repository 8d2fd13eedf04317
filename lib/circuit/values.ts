import type { Design, NamedValue, Typed } from "@/lib/language/ast";
import { evaluate, type Scope } from "@/lib/language/evaluate";
import { thermalVoltage } from "@/lib/units/constants";

/** What moves with V_T: a value that reads it moves with this knob. */
export const TEMPERATURE = "temperature";

/** Knobs and lets at the point being solved, coherent SI values, nominal (tolerances are not drawn). */
export class PointValues implements Scope {
  private readonly knobs = new Map<string, number>();
  private readonly lets = new Map<string, number>();
  private readonly movers = new Map<string, ReadonlySet<string>>();
  private readonly named: readonly NamedValue[];
  thermalVoltage = 0;

  constructor(design: Design) {
    this.named = design.lets;
    for (const { name, value } of design.knobs) {
      if (value.op === "constant") this.knobs.set(name, value.value);
      this.movers.set(name, new Set([name]));
    }
    for (const { name, value } of design.lets) this.movers.set(name, this.moversOf(value));
    this.refresh(null);
  }

  get kelvin(): number {
    return this.knob(TEMPERATURE);
  }

  knob(name: string): number {
    return this.knobs.get(name)!;
  }

  let(name: string): number {
    return this.lets.get(name)!;
  }

  /** Signals are no part of a parameter. */
  signal(): number {
    return Number.NaN;
  }

  of(value: NamedValue): number {
    return evaluate(value.value, this);
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
      if (knob === null || this.movers.get(one.name)!.has(knob)) this.lets.set(one.name, this.of(one));
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
