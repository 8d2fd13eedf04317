import { ROOM_TEMPERATURE, thermalVoltage } from "@/lib/units/constants";
import type { NamedValue, Typed } from "./ast";
import { evaluate } from "./evaluate";

/** Values of knobs and lets at the knobs' defaults, without tolerances, and what keeps a let from being fixed. */
export class Nominal {
  private readonly values = new Map<string, number>([["temperature", ROOM_TEMPERATURE]]);
  private readonly movers = new Map<string, string | null>();

  set(name: string, value: number): void {
    this.values.set(name, value);
  }

  /** Notes what moves a let: the name of a knob or V_T, null where nothing does. */
  setMover(name: string, mover: string | null): void {
    this.movers.set(name, mover);
  }

  /** Gives a knob another value and works the lets that move out again; what it returns puts all of them back. */
  turn(knob: string, value: number, moving: readonly NamedValue[]): () => void {
    const before = new Map(
      [knob, ...moving.map(({ name }) => name)].map((name) => [name, this.values.get(name)!]),
    );
    this.values.set(knob, value);
    for (const one of moving) this.values.set(one.name, this.of(one.value));
    return () => {
      for (const [name, old] of before) this.values.set(name, old);
    };
  }

  /** Coherent SI value; NaN for an expression with signals. */
  of(typed: Typed): number {
    // As most values are, in a long text thousands of them.
    if (typed.op === "constant") return typed.value;
    return evaluate(typed, {
      knob: (name) => this.values.get(name) ?? Number.NaN,
      let: (name) => this.values.get(name) ?? Number.NaN,
      signal: () => Number.NaN,
      thermalVoltage: thermalVoltage(this.values.get("temperature")!),
    });
  }

  /** The name of a knob (or V_T) on which the value depends, directly or through lets; null where it is fixed. */
  mover(typed: Typed): string | null {
    switch (typed.op) {
      case "constant":
      case "signal":
      case "reduce":
      case "trace":
      case "reading":
        return null;
      case "knob":
        return typed.name;
      case "let":
        return this.movers.get(typed.name) ?? null;
      case "thermal voltage":
        return "V_T";
      case "negate":
        return this.mover(typed.operand);
      case "call":
        for (const arg of typed.args) {
          const mover = this.mover(arg);
          if (mover !== null) return mover;
        }
        return null;
      default:
        return this.mover(typed.left) ?? this.mover(typed.right);
    }
  }
}
