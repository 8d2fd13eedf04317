import { compile, type Job } from "@/lib/analyses/compile";
import type { Diagnostic } from "@/lib/language/diagnostic";
import { unitOf } from "@/lib/units/quantity";

/** A sweep as the sheet draws it: at most 200 of its `count` values, in `unit` (coherent SI), the first and last among them. */
export interface SweepSummary {
  readonly knob: string;
  readonly unit: string;
  readonly scale: "logarithmic" | "linear" | "list";
  readonly count: number;
  readonly values: readonly number[];
}

/** What a text would compute. Values in coherent SI units. */
export interface PlanSummary {
  readonly title: string;
  readonly sweeps: readonly SweepSummary[];
  readonly points: number;
  readonly traces: readonly { readonly name: string; readonly unit: string }[];
  readonly knobs: readonly { readonly name: string; readonly unit: string; readonly value: number }[];
  readonly unknowns: number;
  readonly elements: number;
}

/** What the checker says of a text. `plan` is null where a diagnostic is an error. */
export interface Examination {
  readonly diagnostics: readonly Diagnostic[];
  readonly plan: PlanSummary | null;
}

const MOST_VALUES = 200;

/** Checks a text as the service does before it queues it: language, wiring and sizes. Never throws; small enough to be sent. */
export function examine(text: string): Examination {
  const { diagnostics, job } = compile(text);
  return { diagnostics, plan: job === null ? null : summarize(job) };
}

function summarize({ design, plan }: Job): PlanSummary {
  return {
    title: plan.title,
    sweeps: plan.axes.map(({ knob, unit, scale, values }) => ({
      knob,
      unit,
      scale,
      count: values.length,
      values: pick(values),
    })),
    points: plan.points,
    traces: plan.traces,
    knobs: design.knobs.map(({ name, value }) => ({
      name,
      unit: unitOf(value.dimension),
      value: value.op === "constant" ? value.value : Number.NaN,
    })),
    unknowns: plan.unknowns.length,
    elements: design.elements.length,
  };
}

function pick(values: readonly number[]): readonly number[] {
  if (values.length <= MOST_VALUES) return values;
  const step = (values.length - 1) / (MOST_VALUES - 1);
  return Array.from({ length: MOST_VALUES }, (_, i) => values[Math.round(i * step)]!);
}
