import type { Reading } from "@/lib/language/ast";
import type { Job } from "./compile";
import { judge } from "./judge";
import { type Plan, placeOnAxes } from "./plan";
import { readAll } from "./readings";
import type { ReadingDocument } from "./result";
import { type Contract, Rows } from "./rows";
import { type Sensitivities, sensitivitiesOf } from "./sensitivity";

/** What one toleranced value, or the common part of a track group, costs a reading. */
export interface BudgetPart {
  /** A part, or `track GROUP`. */
  readonly part: string;
  /** The name of its value; empty for a group. */
  readonly parameter: string;
  /** Change of the reading, in its unit, where the value goes to the upper end of its tolerance. */
  readonly effect: number;
  /** Change of the reading by one coherent unit of the value; null for a group. */
  readonly slope: number | null;
  /** Its share of the variance of the reading, 0 to 1. */
  readonly share: number;
}

/** The error budget of a reading at one setting of the outer knobs. */
export interface Budget {
  readonly reading: string;
  readonly unit: string;
  /** The place of its value among those of the reading. */
  readonly row: number;
  readonly at: readonly { readonly knob: string; readonly unit: string; readonly value: number }[];
  readonly nominal: number;
  /** The reading with every value at that end of its tolerance which makes it least and most, to first order. */
  readonly low: number;
  readonly high: number;
  /** Standard deviation to first order. */
  readonly sigma: number;
  /** The costliest first. */
  readonly parts: readonly BudgetPart[];
}

/** Step of a reading's own difference, in half-widths of a variable. */
const STEP = 0.01;

/** Values worked out at most (nominal points × traces × variables and unknowns); a larger run has no budget. */
const MOST_WORK = 2_000_000;

/** Error budgets of a run, or null where it is too large for them. */
export interface Budgets {
  readonly readings: readonly Budget[];
  /** Of what each requirement is about, where it is worst in the nominal design; `reading` is its label. */
  readonly requirements: readonly Budget[];
}

/** Error budgets of the readings alone. */
export function budgetsOf(job: Job): readonly Budget[] | null {
  return allBudgets(job)?.readings ?? null;
}

/**
 * Error budgets of every reading that is a number and of every requirement, to first order about the nominal design: variance
 * Σ (s·σ)² with the share of each part (s·σ)²/Σ, worst case Σ |s·half-width|. Empty where nothing has a tolerance.
 */
export function allBudgets(job: Job): Budgets | null {
  const { design, plan, circuit } = job;
  const points = plan.points / (plan.draws + 1);
  const asks = design.reads.length + design.requirements.length > 0;
  if (!asks || !isToleranced(design)) return { readings: [], requirements: [] };
  const toleranced = design.elements.length + design.lets.length;
  if (points * Math.max(1, plan.traces.length) * (toleranced + circuit.size) > MOST_WORK) return null;
  const found = sensitivitiesOf(job);
  if (found.variables.length === 0) return { readings: [], requirements: [] };
  const nominal = { design, plan: { ...plan, draws: 0, points } };
  const worst = worstValues(nominal, found.traces);
  const contract = { ...nominal, design: { ...design, reads: [...design.reads, ...worst] } };
  const read = (traces: readonly Float64Array[]) => readAll(contract, new Rows(contract, { traces }));
  const effects = found.variables.map((_, v) => effectsOf(found, v, read));
  const budgets = read(found.traces).map((reading, r) =>
    budgetsOfOne(reading, r, effects, found, nominal.plan),
  );
  const labels = new Map(worst.map(({ name, label }) => [name, label]));
  const named = budgets.slice(design.reads.length).flat();
  return {
    readings: budgets.slice(0, design.reads.length).flat(),
    requirements: named.map((one) => ({ ...one, reading: labels.get(one.reading)! })),
  };
}

/** What every requirement is about, read where it is worst in the nominal design. No name of a file has a blank in it. */
function worstValues(
  nominal: Contract,
  traces: readonly Float64Array[],
): (Reading & { readonly label: string })[] {
  // Without draws a share of them has no worst place, so each is judged as if it held for all.
  const all = nominal.design.requirements.map((one) => ({ ...one, share: null }));
  const { requirements } = judge(
    { ...nominal, design: { ...nominal.design, requirements: all } },
    { traces },
  );
  return nominal.design.requirements.flatMap(({ label, value, windows, from, to }, i) => {
    const { worst } = requirements[i]!;
    if (worst === null) return [];
    const pinned = worst.at.map(({ knob, value: at }) => ({ knob, low: at, high: at, from, to }));
    return [{ name: `require ${i}`, label, value, windows: [...windows, ...pinned], from, to }];
  });
}

/** The budgets of a reading, one a row; none of a trace. */
function budgetsOfOne(
  { name, unit, per, values }: ReadingDocument,
  r: number,
  effects: readonly (readonly (readonly number[])[])[],
  found: Sensitivities,
  plan: Plan,
): Budget[] {
  if (per === "point") return [];
  return values.flatMap((value, row) => {
    const of = effects.map((all) => all[r]![row]!);
    if (value === null || !of.every(Number.isFinite)) return [];
    const places = placeOnAxes(plan, row * (plan.points / values.length)).slice(1);
    const at = places.map((place, i) => {
      const { knob, unit: its, values: along } = plan.axes[i + 1]!;
      return { knob, unit: its, value: along[place]! };
    });
    return [{ reading: name, unit, row, at, nominal: value, ...budgetOf(value, of, found) }];
  });
}

function isToleranced({ knobs, lets, models, elements }: Job["design"]): boolean {
  const given = [...models, ...elements].flatMap(({ params }) => [...params.values()]);
  const values = elements.flatMap(({ value }) => (value === null ? [] : [value]));
  return [...knobs, ...lets, ...given, ...values].some(({ tolerance }) => tolerance !== null);
}

/** Changes of every reading per half-width of a variable, by reading and row. */
function effectsOf(
  { traces, slopes }: Sensitivities,
  v: number,
  read: (traces: readonly Float64Array[]) => readonly ReadingDocument[],
): number[][] {
  const moved = (by: number) =>
    read(traces.map((column, j) => column.map((value, i) => value + by * slopes[v]![j]![i]!)));
  const [down, up] = [moved(-STEP), moved(STEP)];
  const [far, wide] = [moved(-2 * STEP), moved(2 * STEP)];
  return up.map(({ values }, r) =>
    values.map((_, row) => {
      const of = (all: readonly ReadingDocument[]) => all[r]!.values[row] ?? Number.NaN;
      return (8 * (of(up) - of(down)) - (of(wide) - of(far))) / (12 * STEP);
    }),
  );
}

function budgetOf(
  nominal: number,
  effects: readonly number[],
  { variables }: Sensitivities,
): Pick<Budget, "low" | "high" | "sigma" | "parts"> {
  const variance = effects.reduce((sum, effect, v) => sum + (effect * variables[v]!.sigma) ** 2, 0);
  const reach = effects.reduce((sum, effect) => sum + Math.abs(effect), 0);
  const parts = variables.map(({ part, parameter, sigma, half }, v): BudgetPart => {
    const effect = effects[v]!;
    const share = variance === 0 ? 0 : (effect * sigma) ** 2 / variance;
    return { part, parameter, effect, slope: half === null ? null : effect / half, share };
  });
  parts.sort((a, b) => b.share - a.share);
  return { low: nominal - reach, high: nominal + reach, sigma: Math.sqrt(variance), parts };
}
