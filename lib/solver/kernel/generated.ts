import { advanceLoop, writeAdvance } from "@/lib/circuit/code/advance";
import { LoopWriter } from "@/lib/circuit/code/loops";
import { type Code, type Compiled, FIRST_OWN, Machine, mayCompile } from "@/lib/circuit/code/machine";
import { type FunctionBody, get, OPCODE } from "@/lib/circuit/code/module";
import { type Home, StraightCode } from "@/lib/circuit/code/straight";
import type { System } from "@/lib/circuit/system";
import type { Elimination, SparseShape } from "../elimination";
import { BOUND_ARRAYS, BoundsCode, boundHomes } from "./bounds-code";
import { EliminationCode, eliminationHomes } from "./elimination-code";
import { factorsOf, type Kernel } from "./kernel";
import { ListedKernel } from "./listed";
import { LoopedElimination } from "./looped";

/** Multiplications and entries of straight code at most; beyond, loops are as fast, and compiled at once. */
const MOST_OPERATIONS = 4000;

interface Codes<Of> {
  readonly assemble: Of;
  readonly solve: Of;
  /** A solution with the factors at hand. */
  readonly again: Of;
  /** Assembly and solution in one. */
  readonly step: Of;
  /** Adds the step to the unknowns. */
  readonly advance: Of;
  /** What `TriangularBounds` makes of the factors at hand; in straight code only. */
  readonly bound: Of | null;
}

/** Code with the integers that it reads. */
interface Generated {
  readonly codes: Codes<Code>;
  readonly integers: Int32Array;
}

/**
 * A system's Newton step at rest as generated code over one memory to which the system's frame moves: straight code, every number in a
 * variable of its own and every place a number, or loops for what is too long for that. The same bytes as loops over tables and lists give. Of
 * the user's there is nothing in the code: neither names nor values.
 */
export class GeneratedStep implements Kernel {
  /** Where the solution stands, and the factors. */
  readonly step: Float64Array;
  readonly factors: Float64Array;
  private readonly listed: ListedKernel;
  private readonly functions: Codes<Compiled>;
  /** Views of the arrays of BOUND_ARRAYS. */
  private readonly bounds: readonly Float64Array[];

  private constructor(
    readonly system: System,
    shape: SparseShape,
    plan: Elimination,
    { codes, integers }: Generated,
  ) {
    const { frame } = system;
    const { length } = frame.all;
    const factors = factorsOf(plan);
    const { exponents, less, whole } = frame.starts;
    const places = { count: frame.exponents.length, exponents, less, whole };
    const boundsAt = length + factors.length + shape.size;
    const bounds = BOUND_ARRAYS.length * (shape.size + 1);
    const machine = new Machine(boundsAt + bounds, places, integers.length);
    machine.integers.set(integers);
    this.listed = new ListedKernel(shape, plan);
    const { bound, ...always } = codes;
    this.functions =
      bound === null ? { ...machine.compile(always), bound } : machine.compile({ ...always, bound });
    frame.moveTo(machine.numbers);
    this.factors = machine.numbers.subarray(length, length + factors.length);
    this.factors.set(factors);
    this.step = machine.numbers.subarray(length + factors.length, length + factors.length + shape.size);
    this.bounds = BOUND_ARRAYS.map((_, k) => {
      const start = boundsAt + k * (shape.size + 1);
      return machine.numbers.subarray(start, start + shape.size);
    });
    system.assembly.use(this.functions.assemble);
  }

  /** Null where no code may be generated, or memory is short. The system goes on in other arrays. */
  static of(system: System, shape: SparseShape, plan: Elimination, isStraight = true): GeneratedStep | null {
    if (!mayCompile()) return null;
    const straight = isStraight ? straightOf(system, shape, plan) : null;
    try {
      return new GeneratedStep(system, shape, plan, straight ?? loopedOf(system, shape, plan));
    } catch (error) {
      // Where there is no room for a memory, loops over tables and lists serve.
      if (error instanceof RangeError) return null;
      throw error;
    }
  }

  /** As `assembleAtRest` of the system and `solve` with what it leaves, into `step` and `factors`. */
  take(): boolean {
    const { system, functions } = this;
    if (!system.assembly.hasOthers) return functions.step(system.state.share) === 1;
    system.assembly.runAtRest();
    return functions.solve(1) === 1;
  }

  /** As `advance` of a state by `step`. */
  advance(): void {
    this.functions.advance(1);
  }

  /** As `bound` of `TriangularBounds` for the system's Jacobian and the factors at hand; false, with nothing done, where there is no such code. */
  bound(
    weights: Float64Array,
    roundings: Float64Array,
    doubt: Float64Array,
    spread: Float64Array,
    error: Float64Array,
    change: Float64Array,
  ): boolean {
    const { bound } = this.functions;
    if (bound === null) return false;
    const [w, n, u, s, e, c] = this.bounds as Six<Float64Array>;
    for (let i = 0; i < w.length; i++) {
      w[i] = weights[i]!;
      n[i] = roundings[i]!;
      u[i] = doubt[i]!;
      s[i] = spread[i]!;
    }
    bound(1);
    for (let i = 0; i < e.length; i++) {
      error[i] = e[i]!;
      change[i] = c[i]!;
    }
    return true;
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

type Six<T> = readonly [T, T, T, T, T, T];

/** Whether an elimination is too long for straight code. */
export function isLong(shape: SparseShape, { operations }: Elimination): boolean {
  return operations + shape.rows.length > MOST_OPERATIONS;
}

/** Null where it would be too long. */
function straightOf({ frame, assembly }: System, shape: SparseShape, plan: Elimination): Generated | null {
  if (isLong(shape, plan)) return null;
  const { jacobian, residual } = frame.starts;
  const given = {
    jacobian: (place: number) => `z${jacobian + place}`,
    residual: (row: number) => `z${residual + row}`,
  };
  const z: Home = { start: 0, kept: Number.POSITIVE_INFINITY };
  const factors = frame.all.length;
  const solution = factors + factorsOf(plan).length;
  const homes = {
    z,
    ...eliminationHomes(plan, factors, solution),
    ...boundHomes(shape.size, solution + shape.size),
  };
  const code = () => new StraightCode(homes);
  const codes = {
    assemble: code(),
    solve: code(),
    again: code(),
    step: code(),
    advance: code(),
    bound: code(),
  };
  if (!assembly.write(codes.assemble)) return null;
  assembly.write(codes.step);
  const elimination = (into: StraightCode) => new EliminationCode(into, shape, plan, given);
  elimination(codes.step).write();
  elimination(codes.solve).write();
  elimination(codes.again).writeAgain();
  writeAdvance(codes.advance, frame);
  new BoundsCode(codes.bound, shape, plan, given.jacobian).write();
  return { codes, integers: new Int32Array(0) };
}

function loopedOf({ frame, assembly }: System, shape: SparseShape, plan: Elimination): Generated {
  const factors = frame.all.length;
  const solution = factors + factorsOf(plan).length;
  const tables = assembly.kinds.map(({ table }) => table);
  const begins: number[] = [];
  let lists = Machine.integersStart(solution + shape.size + BOUND_ARRAYS.length * (shape.size + 1));
  for (const { numbers } of tables) {
    begins.push(lists);
    lists += 4 * numbers.length;
  }
  const { jacobian, residual } = frame.starts;
  const elimination = new LoopedElimination(shape, plan, { jacobian, residual, factors, solution, lists });
  const writer = new LoopWriter(frame);
  assembly.writeLoops(writer, begins);
  const called = (number: number) => [...get(0), OPCODE.call, FIRST_OWN + number];
  const step: FunctionBody = {
    name: "step",
    bytes: [...called(0), OPCODE.drop, ...called(1)],
    variables: [],
  };
  const integers = tables.flatMap(({ numbers }) => Array.from(numbers, (value) => 8 * value));
  return {
    codes: {
      assemble: coded(writer.compile("assemble")),
      solve: coded(elimination.whole("solve")),
      again: coded(elimination.again("again")),
      step: coded(step),
      advance: coded(advanceLoop(frame, solution)),
      bound: null,
    },
    integers: Int32Array.from([...integers, ...elimination.list.numbers]),
  };
}

function coded(body: FunctionBody): Code {
  return { text: body.bytes.join(), compile: () => body };
}
