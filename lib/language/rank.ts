import type { NamedValue, Sweep, Typed } from "./ast";
import { REDUCTIONS } from "./reductions";

/** How often a value changes in a run: never, with each sweep of the first knob, or with each point. */
export type Rank = "fixed" | "sweep" | "point";

const ORDER: readonly Rank[] = ["fixed", "sweep", "point"];

export function highestRank(ranks: readonly Rank[]): Rank {
  return ORDER[Math.max(0, ...ranks.map((rank) => ORDER.indexOf(rank)))]!;
}

/** Ranks of checked expressions under one plan. */
export class Ranks {
  private readonly lets = new Map<string, Rank>();
  private readonly readings = new Map<string, Rank>();

  /** `lets` in an order in which each uses only those before it. */
  constructor(
    private readonly sweeps: readonly Sweep[],
    lets: readonly NamedValue[],
  ) {
    for (const { name, value } of lets) this.lets.set(name, this.of(value));
  }

  setReading(name: string, rank: Rank): void {
    this.readings.set(name, rank);
  }

  of(typed: Typed): Rank {
    switch (typed.op) {
      case "constant":
        return "fixed";
      case "knob":
        return this.ofKnob(typed.name);
      case "let":
        return this.lets.get(typed.name) ?? "fixed";
      case "thermal voltage":
        return this.ofKnob("temperature");
      case "signal":
      case "trace":
        return "point";
      case "reading":
        return this.readings.get(typed.name) ?? "sweep";
      case "reduce":
        if (typed.at !== null && typed.at.knob !== this.sweeps[0]?.knob) return this.of(typed.args[0]!);
        return REDUCTIONS[typed.reduction].gives;
      case "negate":
        return this.of(typed.operand);
      case "call":
        return highestRank(typed.args.map((arg) => this.of(arg)));
      default:
        return highestRank([this.of(typed.left), this.of(typed.right)]);
    }
  }

  private ofKnob(name: string): Rank {
    const axis = this.sweeps.findIndex(({ knob }) => knob === name);
    return axis === -1 ? "fixed" : axis === 0 ? "point" : "sweep";
  }
}

/** Every expression within, itself first. */
export function within(typed: Typed): Typed[] {
  const found = [typed];
  for (let i = 0; i < found.length; i++) {
    const part = found[i]!;
    if (part.op === "negate") found.push(part.operand);
    else if (part.op === "call" || part.op === "reduce") found.push(...part.args);
    else if ("left" in part) found.push(part.left, part.right);
  }
  return found;
}
