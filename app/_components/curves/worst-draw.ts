import type { CurveSet } from "./curve-set";
import type { CurveRequirement } from "./curve-source";
import type { CurveView } from "./curve-view";

/** A draw to be drawn beside the nominal design, and the requirement whose worst it is. */
export interface WorstDraw {
  readonly label: string;
  readonly draw: number;
}

/** The worst draws that the requirements of a run name, broken requirements first; the nominal design is none. */
export function worstDraws({ source, draws }: CurveSet): WorstDraw[] {
  const rank = ({ verdict }: CurveRequirement) => (verdict === "broken" ? 0 : 1);
  return (source.requirements ?? [])
    .toSorted((a, b) => rank(a) - rank(b))
    .flatMap(({ label, worst }) =>
      worst === null || worst.draw === 0 || worst.draw > draws ? [] : [{ label, draw: worst.draw }],
    );
}

/** The worst draw that a view asks for: the first unless it names another, null where it wants none. */
export function shownWorst(set: CurveSet, { worst }: CurveView): WorstDraw | null {
  const all = worstDraws(set);
  if (worst === "") return null;
  return all.find(({ label }) => label === worst) ?? all[0] ?? null;
}
