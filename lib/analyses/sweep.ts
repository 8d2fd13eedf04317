import { System } from "@/lib/circuit/system";
import { evaluate } from "@/lib/language/evaluate";
import { Ladder } from "@/lib/solver/ladder";
import { OUTCOMES, RUNGS } from "@/lib/solver/outcome";
import type { Job } from "./compile";
import { placeOnAxes } from "./plan";
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
  const knobsAt = (point: number) =>
    placeOnAxes(plan, point).map((place, axis) => {
      const { knob, values } = plan.axes[axis]!;
      return [knob, values[place]!] as const;
    });
  system.turn(knobsAt(0));
  const ladder = new Ladder(system);
  const predictor = new Predictor(system.state);
  const column = () => new Float64Array(to - from).fill(Number.NaN);
  const traces = plan.traces.map(column);
  const unknowns = plan.unknowns.map(column);
  const [outcome, iterations, residual, rung] = [column(), column(), column(), column()];
  const failures: Failure[] = [];
  const { values } = system;
  const scope = {
    knob: (name: string) => values.knob(name),
    let: (name: string) => values.let(name),
    signal: system.signal.bind(system),
    get thermalVoltage() {
      return values.thermalVoltage;
    },
  };

  for (let strand = strandAt(plan, from); strand.from < to; strand = strandAt(plan, strand.to)) {
    ladder.reset();
    predictor.reset();
    for (let point = strand.from; point < Math.min(strand.to, to); point++) {
      system.turn(knobsAt(point));
      const result = ladder.solve(predictor.predict());
      predictor.learn(result.kind === "converged");
      if (point < from) continue;
      const k = point - from;
      outcome[k] = OUTCOMES.indexOf(result.kind);
      iterations[k] = result.iterations;
      residual[k] = result.residual;
      rung[k] = RUNGS.indexOf(result.rung);
      if (result.kind === "converged") {
        for (let j = 0; j < unknowns.length; j++) unknowns[j]![k] = system.state.x[j]!;
        for (let j = 0; j < traces.length; j++) traces[j]![k] = evaluate(design.shows[j]!.value, scope);
      } else failures.push({ point, outcome: result.kind, unsettled: result.unsettled });
      if ((k + 1) % WATCHED === 0) watch?.(k + 1);
    }
    if (strand.to >= plan.points) break;
  }
  watch?.(to - from);
  return { from, to, traces, unknowns, outcome, iterations, residual, rung, failures };
}
