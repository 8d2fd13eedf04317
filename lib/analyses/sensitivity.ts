import type { Part } from "@/lib/circuit/part";
import type { System } from "@/lib/circuit/system";
import type { Typed } from "@/lib/language/ast";
import { evaluate, type Scope } from "@/lib/language/evaluate";
import { signalsOf } from "@/lib/language/signals-of";
import { LinearSolver } from "@/lib/solver/linear";
import type { Job } from "./compile";
import { Moved, type Variable } from "./variables";
import { scopeOf, walk } from "./walk";

/** Steps of unknowns for the slopes of a trace: V, and the share of a current. */
const VOLTS = 3e-5;
const CURRENT_SHARE = 1e-3;
const LEAST_CURRENT = 1e-12;

/** How traces change with each variable: one column a trace, one value a nominal point, per half-width; NaN where not solved. */
export interface Sensitivities {
  readonly variables: readonly Variable[];
  /** By variable, then by trace. */
  readonly slopes: readonly (readonly Float64Array[])[];
  /** The nominal traces. */
  readonly traces: readonly Float64Array[];
}

/**
 * Adjoint sensitivities (Director and Rohrer, IEEE Trans. Circuit Theory 16, 1969, 318): with F(x, z) = 0 and a trace T(x, z),
 * dT/dz = ∂T/∂z − λᵀ·∂F/∂z where Jᵀ·λ = ∂T/∂x, so one transposed solve a trace and point serves every variable z. ∂F/∂z and ∂T/∂z
 * are differences of fourth order in the equations of the parts that z moves, at fixed unknowns; nothing is solved again.
 */
export function sensitivitiesOf(job: Job): Sensitivities {
  const { plan, design } = job;
  const points = plan.points / (plan.draws + 1);
  const column = () => new Float64Array(points).fill(Number.NaN);
  const traces = plan.traces.map(column);
  let adjoint: Adjoint | null = null;
  let slopes: Float64Array[][] = [];
  walk(job, 0, points, (point, { kind }, system) => {
    if (adjoint === null) {
      adjoint = new Adjoint(system);
      slopes = adjoint.variables.map(() => plan.traces.map(column));
    }
    if (kind !== "converged") return;
    adjoint.linearise();
    design.shows.forEach(({ value }, j) => {
      traces[j]![point] = evaluate(value, adjoint!.scope);
      adjoint!.slopesOf(value).forEach((slope, v) => {
        slopes[v]![j]![point] = slope;
      });
    });
  });
  const { variables } = adjoint ?? { variables: [] };
  return { variables, slopes, traces };
}

/** The adjoint of a system at the point to which it is solved. It leaves the unknowns as they are and the figures nominal. */
class Adjoint {
  readonly variables: readonly Variable[];
  readonly scope: Scope;
  private readonly moved = new Moved();
  private readonly parts: readonly (readonly Part[])[];
  private readonly linear: LinearSolver;
  /** ∂F/∂z of each variable at the present point. */
  private readonly slopes: readonly Float64Array[];
  private readonly gradient: Float64Array;
  private readonly weights: Float64Array;

  constructor(private readonly system: System) {
    const { circuit, pattern } = system;
    this.variables = Moved.variablesOf(system);
    this.scope = scopeOf(system);
    this.parts = this.variables.map(({ elements }) =>
      system.parts.filter(({ element }) => elements.has(element.name)),
    );
    this.slopes = this.variables.map(() => new Float64Array(circuit.size + 1));
    this.gradient = new Float64Array(circuit.size);
    this.weights = new Float64Array(circuit.size);
    const shape = {
      size: circuit.size,
      rows: Int32Array.from(pattern.rows),
      columns: Int32Array.from(pattern.columns),
    };
    system.settle();
    system.assemble();
    this.linear = new LinearSolver(shape, system.state.jacobian);
  }

  /** Factorises the Jacobian at the present unknowns and works out ∂F/∂z. */
  linearise(): void {
    const { system, slopes } = this;
    const { state } = system;
    system.settle();
    system.assemble();
    this.linear.solve(state.jacobian, state.residual, this.weights);
    this.variables.forEach((variable, v) => {
      const slope = slopes[v]!.fill(0);
      this.vary(variable, this.parts[v]!, (weight) => {
        state.residual.fill(0);
        for (const part of this.parts[v]!) part.addTo(state);
        for (let i = 0; i < this.weights.length; i++) slope[i]! += weight * state.residual[i]!;
      });
    });
  }

  /** dT/dz of every variable, per half-width. */
  slopesOf(trace: Typed): number[] {
    const read = new Set(signalsOf(trace).flatMap((signal) => (signal.of === "net" ? [] : [signal.element])));
    this.differentiate(trace);
    this.linear.solveTransposed(this.gradient, this.weights);
    return this.variables.map((variable, v) => {
      let sum = 0;
      const slope = this.slopes[v]!;
      for (let i = 0; i < this.weights.length; i++) sum -= this.weights[i]! * slope[i]!;
      if ([...variable.elements].some((element) => read.has(element))) {
        this.vary(variable, this.parts[v]!, (weight) => {
          sum += weight * evaluate(trace, this.scope);
        });
      }
      return sum;
    });
  }

  /** ∂T/∂x into the gradient. */
  private differentiate(trace: Typed): void {
    const { gradient, system } = this;
    const { x } = system.state;
    if (trace.op === "signal" && trace.signal.of === "net") {
      gradient.fill(0);
      gradient[system.circuit.nets.get(trace.signal.net)!] = 1;
      return;
    }
    for (let i = 0; i < gradient.length; i++) {
      const at = x[i]!;
      const isVoltage = system.circuit.unknowns[i]!.unit === "V";
      const step = isVoltage ? VOLTS : Math.max(LEAST_CURRENT, CURRENT_SHARE * Math.abs(at));
      gradient[i] = 0;
      for (const [steps, weight] of STENCIL) {
        x[i] = at + steps * step;
        gradient[i]! += (weight * evaluate(trace, this.scope)) / step;
      }
      x[i] = at;
    }
  }

  /** Calls `each` with the variable moved by each step of the difference, and the weight of what it then finds. */
  private vary(variable: Variable, parts: readonly Part[], each: (weight: number) => void): void {
    const { values } = this.system;
    const read = () => {
      for (const part of parts) values.within(part.element.name, () => part.read(values));
    };
    values.use(this.moved);
    this.moved.variable = variable;
    for (const [steps, weight] of STENCIL) {
      this.moved.by = steps * variable.step;
      read();
      each(weight / variable.step);
    }
    values.use(null);
    read();
  }
}

/** Steps and weights of the central difference of fourth order (Abramowitz and Stegun 25.3.6). */
const STENCIL: readonly (readonly [number, number])[] = [
  [-2, 1 / 12],
  [-1, -8 / 12],
  [1, 8 / 12],
  [2, -1 / 12],
];
