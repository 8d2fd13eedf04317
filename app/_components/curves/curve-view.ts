import type { CurveSet } from "./curve-set";
import type { Range } from "./range";
import type { Scale } from "./scale";
import { type Choice, usualChoice } from "./storeys";

/** The one trace or the one setting that a reader wants to see alone. */
export type Isolated = { readonly trace: string } | { readonly family: number };

/** What a reader chose about a plot; null (or a missing unit) leaves it as it usually is. */
export interface CurveView {
  readonly traces: readonly string[] | null;
  readonly families: readonly number[] | null;
  readonly x: Scale | null;
  /** By the key of a storey, which is its unit unless a unit has two. */
  readonly y: Readonly<Record<string, Scale>>;
  /** Part of the sweep that is in view, in coherent values of the first knob. */
  readonly zoom: Range | null;
  /** Seen alone for the moment; what was chosen besides stays as it is. */
  readonly only?: Isolated | null;
  /** False hides the band of the draws. */
  readonly band?: boolean;
  /** Label of the requirement whose worst draw is drawn; "" for none, null or missing for the usual one. */
  readonly worst?: string | null;
}

export const USUAL_VIEW: CurveView = { traces: null, families: null, x: null, y: {}, zoom: null };

/**
 * The choice a view makes among what the run has. Names and numbers that it does not have fall out; where none of those asked for
 * is left, an old address perhaps, the usual ones stand.
 */
export function choiceOf(set: CurveSet, view: CurveView): Choice {
  const usual = usualChoice(set);
  const known = <T>(asked: readonly T[] | null, has: (one: T) => boolean, otherwise: readonly T[]) => {
    const left = asked?.filter(has) ?? otherwise;
    return left.length === 0 && asked?.length !== 0 ? otherwise : left;
  };
  return {
    traces: known(view.traces, (name) => usual.traces.includes(name), usual.traces),
    families: known(view.families, (index) => index < set.families.length, usual.families),
  };
}

/** The choice as it is drawn: narrowed to what is seen alone. */
export function drawnChoice(set: CurveSet, view: CurveView): Choice {
  const choice = choiceOf(set, view);
  const only = view.only ?? null;
  if (only === null) return choice;
  if ("trace" in only) {
    const isKnown = set.traces.some(({ name }) => name === only.trace);
    return isKnown ? { ...choice, traces: [only.trace] } : choice;
  }
  return only.family < set.families.length ? { ...choice, families: [only.family] } : choice;
}
