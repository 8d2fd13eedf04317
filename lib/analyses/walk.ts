import { System } from "@/lib/circuit/system";
import type { Scope } from "@/lib/language/evaluate";
import { Ladder } from "@/lib/solver/ladder";
import type { Outcome } from "@/lib/solver/outcome";
import type { Job } from "./compile";
import { Draws } from "./draws";
import { drawOf, placeOnAxes } from "./plan";
import { Predictor } from "./predictor";
import { strandAt } from "./strands";

/** A flat point just solved; the system stands at it until the next one is asked for. */
export interface Stop {
  readonly point: number;
  readonly outcome: Outcome;
  readonly system: System;
}

/** Solves the flat points [from, to) of a job one after the other; `each` sees the system at every one of them, just solved. */
export function walk(
  job: Job,
  from: number,
  to: number,
  each: (point: number, outcome: Outcome, system: System) => void,
): void {
  for (const { point, outcome, system } of stops(job, from, to)) each(point, outcome, system);
}

/**
 * Solves the flat points [from, to) of a job one at a time, as they are asked for. Each strand starts cold, so that a point does
 * not depend on the range in which it is asked for; a range that begins inside a strand solves the strand's beginning too.
 * Without `isProving` no bounds are sought, which is quicker.
 */
export function* stops(job: Job, from: number, to: number, isProving = true): Generator<Stop, void, void> {
  const { design, circuit, plan } = job;
  const system = new System(design, circuit);
  const draws = new Draws(design);
  let draw = 0;
  turnTo(system, job, 0);
  const ladder = new Ladder(system, isProving);
  const predictor = new Predictor(system.state);
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
      if (point >= from) yield { point, outcome, system };
    }
    if (strand.to >= plan.points) break;
    strand = strandAt(plan, strand.to);
  }
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

/** What an expression sees at the point to which a system is solved. */
export function scopeOf(system: System): Scope {
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
