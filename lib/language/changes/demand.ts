import type { Design, Requirement, Window } from "../ast";
import { Nominal } from "../nominal";
import { sameMeaning } from "./same";

/** Whether a requirement is harder to hold than another, easier, just as hard, or not to be compared. */
export type Judged = "tightened" | "loosened" | "same" | "other";

/** −1 easier, 0 as hard, 1 harder; null where neither can be said. */
type Sense = -1 | 0 | 1 | null;

interface Band {
  readonly low: number;
  readonly high: number;
  readonly isStrict: boolean;
}

/** What the requirements of one design demand, worked out at the defaults of its knobs. */
export class Demand {
  private readonly nominal = new Nominal();

  constructor({ knobs, lets }: Design) {
    for (const { name, value } of [...knobs, ...lets]) this.nominal.set(name, this.nominal.of(value));
  }

  /** How `now`, a requirement of this design, compares with `was`, one of `earlier`. */
  against(now: Requirement, earlier: Demand, was: Requirement): Judged {
    if (!sameMeaning(now.value, was.value)) return "other";
    const senses = [
      this.bands(now, earlier, was),
      ofWindows(was.windows, now.windows),
      Math.sign((now.share ?? 1.5) - (was.share ?? 1.5)) as Sense,
    ];
    if (senses.includes(null)) return "other";
    if (senses.every((sense) => sense === 0)) return "same";
    if (senses.every((sense) => sense !== -1)) return "tightened";
    return senses.every((sense) => sense !== 1) ? "loosened" : "other";
  }

  private bands(now: Requirement, earlier: Demand, was: Requirement): Sense {
    const [next, old] = [this.band(now), earlier.band(was)];
    if (next === null || old === null) return sameMeaning(now.relation, was.relation) ? 0 : null;
    const sense = inside(old, next);
    return sense === 0 ? ((Number(next.isStrict) - Number(old.isStrict)) as Sense) : sense;
  }

  /** Where the value has to lie; null where that is no band of fixed numbers. */
  private band({ relation }: Requirement): Band | null {
    const [low, high] = [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];
    const found = ((): Band | null => {
      switch (relation.kind) {
        case "compare": {
          const bound = this.nominal.of(relation.bound);
          const isStrict = relation.operator.length === 1;
          return relation.operator.startsWith("<")
            ? { low, high: bound, isStrict }
            : { low: bound, high, isStrict };
        }
        case "within": {
          const target = this.nominal.of(relation.target);
          const half = this.nominal.of(relation.half) * (relation.relative ? Math.abs(target) : 1);
          return { low: target - half, high: target + half, isStrict: false };
        }
        case "between":
          return {
            low: this.nominal.of(relation.low),
            high: this.nominal.of(relation.high),
            isStrict: false,
          };
        default:
          return null;
      }
    })();
    return found === null || Number.isNaN(found.low) || Number.isNaN(found.high) ? null : found;
  }
}

interface Ends {
  readonly low: number;
  readonly high: number;
}

/** 1 where `next` lies within `old`, −1 where it holds all of it, null where they only overlap. */
function inside(old: Ends, next: Ends): Sense {
  if (old.low === next.low && old.high === next.high) return 0;
  if (next.low >= old.low && next.high <= old.high) return 1;
  return next.low <= old.low && next.high >= old.high ? -1 : null;
}

/** A wider window demands more. Without one the whole sweep counts. */
function ofWindows(was: readonly Window[], now: readonly Window[]): Sense {
  const everywhere = { low: Number.NEGATIVE_INFINITY, high: Number.POSITIVE_INFINITY };
  const of = (windows: readonly Window[], knob: string): Ends =>
    windows.find((one) => one.knob === knob) ?? everywhere;
  let found: Sense = 0;
  for (const knob of new Set([...was, ...now].map((one) => one.knob))) {
    const sense = inside(of(now, knob), of(was, knob));
    if (sense === null || (sense !== 0 && found !== 0 && sense !== found)) return null;
    if (sense !== 0) found = sense;
  }
  return found;
}
