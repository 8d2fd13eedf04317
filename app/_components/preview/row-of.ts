import { type Excerpt, elsewhereIn } from "@/lib/analyses/excerpt";
import { judge } from "@/lib/analyses/judge";
import type { ShardResult } from "@/lib/analyses/result";
import { TEMPERATURE } from "@/lib/circuit/values";
import type { Row, Stage } from "./messages";

interface Solved {
  readonly excerpt: Excerpt;
  readonly result: ShardResult;
  readonly stage: Stage;
  /** Places of the whole row. */
  readonly length: number;
  readonly taken: number;
}

/** A solved row with its contract judged, ready to be sent. What the contract says of other settings is named, not judged. */
export function rowOf({ excerpt, result, stage, length, taken }: Solved): Row {
  const { design, plan, from } = excerpt;
  const unstable = result.unstable.map((one) => ({ from: one.from - from, to: one.to - from }));
  const { readings, requirements } = judge({ design, plan }, { traces: result.traces, unstable });
  const elsewhere = elsewhereIn(excerpt);
  const { traces, outcome, rung, iterations, bound } = result;
  const swept = plan.axes.find(({ knob }, axis) => axis > 0 && knob === TEMPERATURE)?.values[0];
  const ambient = design.knobs.find(({ name }) => name === TEMPERATURE)?.value;
  return {
    stage,
    axes: plan.axes,
    length,
    traces: plan.traces.map((trace, k) => ({ ...trace, values: traces[k]! })),
    ...{ outcome, rung, iterations, bound },
    failures: result.failures.map((one) => ({ ...one, point: one.point - from })),
    readings: readings.filter(({ name }) => !elsewhere.readings.has(name)),
    requirements: requirements.filter((_, index) => !elsewhere.requirements.has(index)),
    elsewhere: [
      ...elsewhere.readings,
      ...[...elsewhere.requirements].map((index) => requirements[index]!.label),
    ],
    temperature: swept ?? (ambient?.op === "constant" ? ambient.value : Number.NaN),
    taken,
  };
}

/** The arrays of a row, which change hands when it is sent; its unknowns stay behind for the figures. */
export function arraysOf({ traces, outcome, rung, iterations, bound }: Row): ArrayBuffer[] {
  return [...traces.map(({ values }) => values), outcome, rung, iterations, bound].map(
    ({ buffer }) => buffer as ArrayBuffer,
  );
}
