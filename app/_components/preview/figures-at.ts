import type { Excerpt } from "@/lib/analyses/excerpt";
import { placeOnAxes } from "@/lib/analyses/plan";
import type { ShardResult } from "@/lib/analyses/result";
import { System } from "@/lib/circuit/system";
import type { Element, Signal } from "@/lib/language/ast";
import { Ladder } from "@/lib/solver/ladder";
import type { Figures } from "./messages";
import { figuresOf, knobsOf } from "./outline";

/**
 * Every voltage, current and power of a circuit, every knob and let, at one place of a solved row. Solved anew from the unknowns kept,
 * since the currents between them ask for more digits than those have.
 */
export function figuresAt(
  { job, from }: Excerpt,
  solved: ShardResult,
  place: number,
): Pick<Figures, "at" | "values"> {
  const { design, circuit, plan } = job;
  const system = new System(design, circuit);
  const at = placeOnAxes(plan, from + place).map((index, axis) => {
    const { knob, unit, values } = plan.axes[axis]!;
    system.turn(knob, values[index]!);
    return { knob, unit, value: values[index]! };
  });
  const ladder = new Ladder(system, false);
  solved.unknowns.forEach((column, j) => {
    system.state.x[j] = column[place]!;
  });
  system.state.low.fill(0);
  const isSolved =
    solved.unknowns.every((column) => Number.isFinite(column[place]!)) &&
    ladder.solve(true).kind === "converged";
  const read = (signal: Signal) => (isSolved ? system.signal(signal) : Number.NaN);
  const values = [
    ...design.nets.map((net) => read({ of: "net", net })),
    ...design.elements.flatMap((element) =>
      figuresOf(element).map((figure) => read(signalOf(element, figure))),
    ),
    ...knobsOf(design).map(({ name }) => system.values.knob(name)),
    ...design.lets.map(({ name }) => system.values.let(name)),
  ];
  return { at, values: Float64Array.from(values) };
}

function signalOf({ name }: Element, figure: string): Signal {
  return figure.endsWith(".i")
    ? { of: "pin", element: name, pin: figure.slice(0, -2) }
    : { of: "element", element: name, quantity: figure as "v" | "i" | "p" };
}
