/** Rungs of the ladder (engine.md), tried in this order; the one that solved a point is kept with it. */
export const RUNGS = [
  "warm start",
  "newton",
  "line search",
  "damped newton",
  "pseudo-transient",
  "source ramp",
  "shunt ramp",
  "homotopy",
] as const;
export type Rung = (typeof RUNGS)[number];

export const OUTCOMES = [
  "converged",
  "did not settle",
  "came to a stand",
  "undetermined",
  "out of bounds",
] as const;
export type OutcomeKind = (typeof OUTCOMES)[number];

/** What became of one point. `iterations` counts every linear system solved over all rungs tried; `residual` is the largest |F_i|, A. */
export type Outcome =
  | {
      readonly kind: "converged";
      readonly iterations: number;
      readonly residual: number;
      /** V within which a true solution is proved to lie of every reported voltage; NaN: not proved. */
      readonly bound: number;
      readonly rung: Rung;
      /** An odd number of its modes grows, so that the circuit would leave the point. False does not prove that it stays. */
      readonly isUnstable: boolean;
    }
  | {
      readonly kind: Exclude<OutcomeKind, "converged">;
      readonly iterations: number;
      readonly residual: number;
      readonly rung: Rung;
      /** Nets and elements that would not settle, the worst first, at most five. */
      readonly unsettled: readonly string[];
    };
