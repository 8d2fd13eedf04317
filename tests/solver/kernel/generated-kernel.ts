import { type Compiled, Machine } from "@/lib/circuit/code/machine";
import { StraightCode } from "@/lib/circuit/code/straight";
import type { Elimination, SparseShape } from "@/lib/solver/elimination";
import { EliminationCode, eliminationHomes } from "@/lib/solver/kernel/elimination-code";
import { factorsOf, type Kernel } from "@/lib/solver/kernel/kernel";

/** The generated code of an elimination alone, on arrays that are copied into its memory and out of it. */
export class GeneratedKernel implements Kernel {
  private readonly numbers: Float64Array;
  private readonly starts: { readonly a: number; readonly b: number; readonly f: number; readonly d: number };
  private readonly functions: Readonly<Record<"whole" | "again" | "transposed", Compiled>>;

  constructor(
    private readonly shape: SparseShape,
    plan: Elimination,
  ) {
    const b = shape.rows.length;
    const f = b + shape.size;
    const d = f + factorsOf(plan).length;
    this.starts = { a: 0, b, f, d };
    const all = Number.POSITIVE_INFINITY;
    const homes = {
      a: { start: 0, kept: all },
      b: { start: b, kept: all },
      ...eliminationHomes(plan, f, d),
    };
    const code = (write: (code: EliminationCode) => void) => {
      const into = new StraightCode(homes);
      write(new EliminationCode(into, shape, plan, { jacobian: (k) => `a${k}`, residual: (i) => `b${i}` }));
      return into;
    };
    const machine = new Machine(d + shape.size, { count: 0, exponents: 0, less: 0, whole: 0 });
    this.numbers = machine.numbers;
    this.numbers.set(factorsOf(plan), f);
    this.functions = machine.compile({
      whole: code((whole) => whole.write()),
      again: code((again) => again.writeAgain()),
      transposed: code((transposed) => transposed.writeTransposed()),
    });
  }

  solve(a: Float64Array, b: Float64Array, d: Float64Array): boolean {
    this.numbers.set(a, this.starts.a);
    this.numbers.set(b.subarray(0, this.shape.size), this.starts.b);
    const isGood = this.functions.whole(1) === 1;
    this.give(d);
    return isGood;
  }

  solveAgain(b: Float64Array, d: Float64Array): void {
    this.numbers.set(b.subarray(0, this.shape.size), this.starts.b);
    this.functions.again(1);
    this.give(d);
  }

  solveTransposed(b: Float64Array, d: Float64Array): void {
    this.numbers.set(b.subarray(0, this.shape.size), this.starts.b);
    this.functions.transposed(1);
    this.give(d);
  }

  private give(d: Float64Array): void {
    d.set(this.numbers.subarray(this.starts.d, this.starts.d + this.shape.size));
  }
}
