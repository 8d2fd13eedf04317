import { formatKnob } from "@/app/_components/curves/figures-in-words";
import type { Budget } from "@/lib/analyses/budget";
import { countOf } from "@/lib/analyses/plan";
import type { AxisDocument, ReadingDocument, RequirementDocument } from "@/lib/analyses/result";
import type { Limits } from "./histogram";

/** Something whose spread can be looked at: a reading at one setting of the outer knobs, or what a requirement compares. */
export interface Subject {
  /** As the address names it. */
  readonly key: string;
  readonly name: string;
  readonly unit: string;
  /** Settings of the outer knobs, in words; one without a name where the subject has none of its own. */
  readonly settings: readonly string[];
  readonly kind: "reading" | "requirement";
}

/** What the draws make of a subject at one setting, and what costs it the most. */
export interface SpreadOf {
  readonly nominal: number | null;
  /** One a random draw. */
  readonly drawn: readonly (number | null)[];
  readonly limits: Limits;
  readonly budget: Budget | null;
}

/** What of a run the spread is worked out from. */
export interface SpreadMatter {
  readonly axes: readonly AxisDocument[];
  readonly readings: readonly ReadingDocument[];
  readonly requirements: readonly RequirementDocument[];
  readonly budgets: readonly Budget[];
  readonly causes: readonly Budget[];
}

/** Requirements first, the broken before the others, then readings that are a number; those that nothing spreads are left out. */
export function subjectsOf(matter: SpreadMatter): Subject[] {
  const settings = settingsOf(matter.axes);
  const order = { broken: 0, "no data": 1, holds: 2 };
  const required = matter.requirements
    .map((one, index) => ({ one, index }))
    .sort((a, b) => order[a.one.verdict] - order[b.one.verdict] || a.index - b.index)
    .map(({ one, index }): Subject => {
      return {
        key: `require:${index}`,
        name: one.label,
        unit: one.unit,
        settings: [""],
        kind: "requirement",
      };
    });
  const read = matter.readings
    .filter(({ per }) => per === "sweep")
    .map(({ name, unit }): Subject => ({ key: `read:${name}`, name, unit, settings, kind: "reading" }));
  return [...required, ...read].filter((subject) => isSpread(matter, subject));
}

/** Whether there are draws of a subject or an error budget, at any setting. */
function isSpread(matter: SpreadMatter, { key, kind, name }: Subject): boolean {
  if (kind === "requirement") {
    const one = matter.requirements[Number(key.slice("require:".length))]!;
    return one.drawn.length > 1 || matter.causes.some(({ reading }) => reading === one.label);
  }
  const { values } = matter.readings.find((one) => one.name === name && one.per === "sweep")!;
  return values.length > settingCount(matter.axes) || matter.budgets.some(({ reading }) => reading === name);
}

export function spreadOf(matter: SpreadMatter, { key, kind, name }: Subject, setting: number): SpreadOf {
  if (kind === "requirement") {
    const one = matter.requirements[Number(key.slice("require:".length))]!;
    const [nominal = null, ...drawn] = one.drawn;
    const budget = matter.causes.find(({ reading }) => reading === one.label) ?? null;
    return { nominal, drawn, limits: one.allowed, budget };
  }
  const { values } = matter.readings.find((one) => one.name === name && one.per === "sweep")!;
  const count = settingCount(matter.axes);
  const own = values.filter((_, row) => row % count === setting);
  const limits = matter.requirements.flatMap(({ reading }) =>
    reading?.name === name ? [reading.limits[setting] ?? { low: null, high: null }] : [],
  );
  return {
    nominal: own[0] ?? null,
    drawn: own.slice(1),
    limits: narrowest(limits),
    budget: matter.budgets.find((one) => one.reading === name && one.row === setting) ?? null,
  };
}

/** What all of several limits allow. */
function narrowest(all: readonly Limits[]): Limits {
  const most = (pick: (one: Limits) => number | null, better: (a: number, b: number) => number) =>
    all.map(pick).reduce((a, b) => (a === null ? b : b === null ? a : better(a, b)), null);
  return { low: most((one) => one.low, Math.max), high: most((one) => one.high, Math.min) };
}

/** Settings that a page lists: a run may have half a million, which would hold up whoever renders them and whoever reads. */
export const MOST_LISTED = 500;
/** Values that a table of readings shows, about. */
const MOST_VALUES = 5_000;

/** How many settings the outer axes have. */
export function settingCount(axes: readonly AxisDocument[]): number {
  return axes.slice(1).reduce((product, axis) => product * countOf(axis), 1);
}

/** Settings that a table lists which has so many values for each. */
export function listedBeside(values: number): number {
  return Math.min(MOST_LISTED, Math.max(6, Math.floor(MOST_VALUES / Math.max(1, values))));
}

/** As much of readings as lists show before their document is there, or of compared runs: the nominal design at the first settings. */
export function listedOnly(readings: readonly ReadingDocument[]): ReadingDocument[] {
  const most = listedBeside(readings.length);
  return readings.map((one) => ({ ...one, values: one.values.slice(0, most) }));
}

/** Numbers that readings hold. */
export function numbersIn(readings: readonly ReadingDocument[]): number {
  return readings.reduce((sum, { values }) => sum + values.length, 0);
}

/**
 * The first settings of the outer axes in words, the first outer axis turning fastest, at most as many as said; one empty text where
 * there is none.
 */
export function settingsOf(axes: readonly AxisDocument[], most = MOST_LISTED): string[] {
  const outer = axes.slice(1);
  return Array.from({ length: Math.min(most, settingCount(axes)) }, (_, setting) => {
    let rest = setting;
    return outer
      .map((axis) => {
        const value = axis.values[rest % axis.values.length]!;
        rest = Math.floor(rest / axis.values.length);
        const text = formatKnob(axis, value, 4);
        return axis.knob === "temperature" ? text : `${axis.knob} ${text}`;
      })
      .join(", ");
  });
}
