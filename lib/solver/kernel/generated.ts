import { type Compiled, Machine, mayCompile } from "@/lib/circuit/code/machine";
import { type Home, StraightCode } from "@/lib/circuit/code/straight";
import type { System } from "@/lib/circuit/system";
import type { Elimination, SparseShape } from "../elimination";
import { EliminationCode, eliminationHomes } from "./elimination-code";
import { factorsOf, type Kernel } from "./kernel";
import { ListedKernel } from "./listed";

/** Multiplications and entries of generated code at most; beyond, the list of operations is as fast, and ready at once. */
const MOST_OPERATIONS = 4000;

interface Functions {
  /** Assembly and solution in one, either alone, and a solution with the factors at hand. */
  readonly step: Compiled;
  readonly assemble: Compiled;
  readonly solve: Compiled;
  readonly again: Compiled;
}

/**
 * A system's Newton step at rest as generated code: straight code for its assembly and its elimination, every number in a variable of its
 * own and every place a number, over one memory to which the system's frame moves. The same bytes as loops and lists give. Of the
 * user's there is nothing in the code: neither names nor values.
 */
export class GeneratedStep implements Kernel {
  /** Where the solution stands, and the factors. */
  readonly step: Float64Array;
  readonly factors: Float64Array;
  private readonly listed: ListedKernel;
  private readonly functions: Functions;

  private constructor(
    readonly system: System,
    shape: SparseShape,
    plan: Elimination,
    codes: Readonly<Record<keyof Functions, StraightCode>>,
  ) {
    const { frame } = system;
    const { length } = frame.all;
    const factors = factorsOf(plan);
    const { exponents, less, whole } = frame.starts;
    const places = { count: frame.exponents.length, exponents, less, whole };
    const machine = new Machine(length + factors.length + shape.size, places);
    this.listed = new ListedKernel(shape, plan);
    this.functions = machine.compile(codes);
    frame.moveTo(machine.numbers);
    this.factors = machine.numbers.subarray(length, length + factors.length);
    this.factors.set(factors);
    this.step = machine.numbers.subarray(length + factors.length, length + factors.length + shape.size);
    system.assembly.use(this.functions.assemble);
  }

  /** Null where it would be too long, or no code may be generated here. The system goes on in other arrays. */
  static of(system: System, shape: SparseShape, plan: Elimination): GeneratedStep | null {
    if (!mayCompile() || plan.operations + shape.rows.length > MOST_OPERATIONS) return null;
    const { frame, assembly } = system;
    const { jacobian, residual } = frame.starts;
    const given = {
      jacobian: (place: number) => `z${jacobian + place}`,
      residual: (row: number) => `z${residual + row}`,
    };
    const z: Home = { start: 0, kept: Number.POSITIVE_INFINITY };
    const factors = frame.all.length;
    const homes = { z, ...eliminationHomes(plan, factors, factors + factorsOf(plan).length) };
    const code = () => new StraightCode(homes);
    const codes = { step: code(), assemble: code(), solve: code(), again: code() };
    if (!assembly.write(codes.assemble)) return null;
    assembly.write(codes.step);
    const elimination = (into: StraightCode) => new EliminationCode(into, shape, plan, given);
    elimination(codes.step).write();
    elimination(codes.solve).write();
    elimination(codes.again).writeAgain();
    return new GeneratedStep(system, shape, plan, codes);
  }

  /** As `assembleAtRest` of the system and `solve` with what it leaves, into `step` and `factors`. */
  take(): boolean {
    const { system, functions } = this;
    if (!system.assembly.hasOthers) return functions.step(system.state.share) === 1;
    system.assembly.runAtRest();
    return functions.solve(1) === 1;
  }

  solve(a: Float64Array, b: Float64Array, d: Float64Array, f: Float64Array): boolean {
    const { jacobian, residual } = this.system.state;
    if (a !== jacobian || b !== residual || f !== this.factors) return this.listed.solve(a, b, d, f);
    const isGood = this.functions.solve(1) === 1;
    this.give(d);
    return isGood;
  }

  solveAgain(b: Float64Array, d: Float64Array, f: Float64Array): void {
    if (b !== this.system.state.residual || f !== this.factors) {
      this.listed.solveAgain(b, d, f);
      return;
    }
    this.functions.again(1);
    this.give(d);
  }

  solveTransposed(b: Float64Array, d: Float64Array, f: Float64Array): void {
    this.listed.solveTransposed(b, d, f);
  }

  private give(d: Float64Array): void {
    if (d !== this.step) d.set(this.step);
  }
}
