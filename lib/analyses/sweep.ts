import { System } from "@/lib/circuit/system";
import { evaluate, type Scope } from "@/lib/language/evaluate";
import { Ladder } from "@/lib/solver/ladder";
import { OUTCOMES, type Outcome, RUNGS } from "@/lib/solver/outcome";
import type { Job } from "./compile";
import { Draws } from "./draws";
import { drawOf, placeOnAxes } from "./plan";
import { Predictor } from "./predictor";
import type { Failure, ShardResult } from "./result";
import { strandAt } from "./strands";

/** Points between two calls of `watch`. */
const WATCHED = 64;

/**
 * Solves the flat points [from, to) of a job. Each strand starts cold, so the result of a point does not depend on the range in
 * which it is asked for; a range that begins inside a strand solves the strand's beginning too. `watch` hears how many
 * points of the range are done. A point that fails is a result: NaN in the columns and a failure with its reason.
 */
export function solveRange(
  job: Job,
  from: number,
  to: number,
  watch?: (pointsDone: number) => void,
): ShardResult {
  const { design, circuit, plan } = job;
  const system = new System(design, circuit);
  const draws = new Draws(design);
  let draw = 0;
  turnTo(system, job, 0);
  const ladder = new Ladder(system);
  const predictor = new Predictor(system.state);
  const result = emptyShard(job, from, to);
  const scope = scopeOf(system);
  for (let strand = strandAt(plan, Math.min(from, plan.points - 1)); strand.from < to; ) {
    ladder.reset();
    predictor.reset();
    turnTo(system, job, strand.from);
    if (drawOf(plan, strand.from) !== draw) {
      draw = drawOf(plan, strand.from);
      system.draw(draws.at(draw));
    }
    for (let point = strand.from; point < Math.min(strand.to, to); point++) {
      turnFirst(system, job, point);
      const outcome = ladder.solve(predictor.predict());
      predictor.learn(outcome.kind === "converged");
      if (point < from) continue;
      keep(result, point, outcome, job, system, scope);
      if ((point + 1 - from) % WATCHED === 0) watch?.(point + 1 - from);
    }
    if (strand.to >= plan.points) break;
    strand = strandAt(plan, strand.to);
  }
  watch?.(to - from);
  return result;
}

function turnTo(system: System, { plan }: Job, point: number): void {
  placeOnAxes(plan, point).forEach((place, axis) => {
    const { knob, values } = plan.axes[axis]!;
    system.turn(knob, values[place]!);
  });
}

function turnFirst(system: System, { plan }: Job, point: number): void {
  const first = plan.axes[0];
  if (first !== undefined) system.turn(first.knob, first.values[point % first.values.length]!);
}

function scopeOf(system: System): Scope {
  const { values } = system;
  return {
    knob: (name) => values.knob(name),
    let: (name) => values.let(name),
    signal: (signal) => system.signal(signal),
    get thermalVoltage() {
      return values.thermalVoltage;
    },
  };
}

/** A shard as it fills. */
type Filling = ShardResult & { readonly failures: Failure[] };

function emptyShard({ plan }: Job, from: number, to: number): Filling {
  const column = () => new Float64Array(to - from).fill(Number.NaN);
  return {
    from,
    to,
    traces: plan.traces.map(column),
    unknowns: plan.unknowns.map(column),
    outcome: column(),
    iterations: column(),
    residual: column(),
    bound: column(),
    rung: column(),
    failures: [],
  };
}

function keep(
  into: Filling,
  point: number,
  outcome: Outcome,
  { design }: Job,
  { state }: System,
  scope: Scope,
): void {
  const k = point - into.from;
  into.outcome[k] = OUTCOMES.indexOf(outcome.kind);
  into.iterations[k] = outcome.iterations;
  into.residual[k] = outcome.residual;
  into.rung[k] = RUNGS.indexOf(outcome.rung);
  if (outcome.kind !== "converged") {
    into.failures.push({ point, outcome: outcome.kind, unsettled: outcome.unsettled });
    return;
  }
  into.bound[k] = outcome.bound;
  for (let j = 0; j < into.unknowns.length; j++) into.unknowns[j]![k] = state.x[j]!;
  for (let j = 0; j < into.traces.length; j++) into.traces[j]![k] = evaluate(design.shows[j]!.value, scope);
}
