import { type Compiled, compiled, type Warmth } from "@/lib/circuit/compiled";
import type { Elimination, SparseShape } from "../elimination";
import { type Kernel, MOST_GROWTH } from "./kernel";

/** Multiplications and entries of generated code at most: each takes up to 50 bytes of the 60 kB beyond which V8 no longer optimises. */
const MOST_OPERATIONS = 1100;

/**
 * An elimination as generated code: every value in a variable of its own, every place a number, no loop and no test of a place. The
 * text holds integers and numbers only, never a name or a value of the user.
 */
export class WrittenKernel implements Kernel {
  private again: Compiled | null = null;
  private transposed: Compiled | null = null;

  private constructor(
    private readonly plan: Elimination,
    private readonly whole: Compiled,
    readonly warmth: Warmth,
  ) {}

  /** Null where the elimination is too long for straight code, or none may be generated here. */
  static of(shape: SparseShape, plan: Elimination): WrittenKernel | null {
    if (plan.operations + shape.rows.length > MOST_OPERATIONS) return null;
    const whole = compiled("a,b,d,f", solveText(shape, plan));
    return whole === null ? null : new WrittenKernel(plan, whole.made, whole.warmth);
  }

  solve(a: Float64Array, b: Float64Array, d: Float64Array, f: Float64Array): boolean {
    return this.whole(a, b, d, f) === 1;
  }

  solveAgain(b: Float64Array, d: Float64Array, f: Float64Array): void {
    this.again ??= compiled("b,d,f", againText(this.plan))!.made;
    this.again(b, d, f);
  }

  solveTransposed(b: Float64Array, d: Float64Array, f: Float64Array): void {
    this.transposed ??= compiled("b,d,f", transposedText(this.plan))!.made;
    this.transposed(b, d, f);
  }
}

/** Variables: v of a place, p the inverse of a pivot, w of a row, x of a column, q a product, g what is subtracted from a row. */
function solveText(shape: SparseShape, plan: Elimination): string {
  return [
    factorText(shape, plan),
    substitutionText(
      plan,
      (place) => numberOf(plan, place),
      (k) => inverseOf(plan, k),
    ),
    monitorText(plan),
  ].join("\n");
}

/** A value is fetched where it is first needed and kept where it is final, so that few are alive at a time. */
function factorText({ rows }: SparseShape, plan: Elimination): string {
  const { factor, pivots, places, changed, belowRows, constants } = plan;
  const lines = Array.from(changed, (row) => `let g${row}=0;`);
  const fetched = new Set<number>();
  const load = (place: number) => {
    if (constants[place] === 0 && !fetched.has(place))
      lines.push(`let v${place}=${place < rows.length ? `a[${place}]` : 0};`);
    fetched.add(place);
  };
  let at = 0;
  let s = 0;
  let products = 0;
  for (let k = 0; k < pivots.length; k++) {
    const pivot = factor[at]!;
    const below = factor[at + 1]!;
    const right = factor[at + 2]!;
    const row = at + 3;
    at = row + right;
    load(pivot);
    if (constants[pivot] === 0) lines.push(`const p${k}=1/v${pivot};`, `f[${places + k}]=p${k};`);
    for (let j = 0; j < right; j++) {
      load(factor[row + j]!);
      lines.push(keep(plan, factor[row + j]!));
    }
    for (let i = 0; i < below; i++) {
      const multiplier = factor[at++]!;
      load(multiplier);
      if (constants[multiplier] === 0) {
        lines.push(`v${multiplier}=${times(`v${multiplier}`, inverseOf(plan, k))};`, keep(plan, multiplier));
      }
      const target = belowRows[s++];
      for (let j = 0; j < right; j++) {
        const q = `q${products++}`;
        load(factor[at + j]!);
        lines.push(`const ${q}=${times(numberOf(plan, multiplier), numberOf(plan, factor[row + j]!))};`);
        lines.push(`v${factor[at + j]}-=${q};g${target}+=Math.abs(${q});`);
      }
      at += right;
    }
  }
  return lines.join("\n");
}

function keep({ constants }: Elimination, place: number): string {
  return constants[place] === 0 ? `f[${place}]=v${place};` : "";
}

function numberOf({ constants }: Elimination, place: number): string {
  return constants[place] === 0 ? `v${place}` : `${constants[place]}`;
}

function inverseOf({ constants, pivots }: Elimination, k: number): string {
  return constants[pivots[k]!] === 0 ? `p${k}` : `${constants[pivots[k]!]}`;
}

/** Where a later solution finds a factor and the inverse of a pivot. */
function keptBy(plan: Elimination): { value: (place: number) => string; inverse: (k: number) => string } {
  const { constants, pivots, places } = plan;
  return {
    value: (place) => (constants[place] === 0 ? `f[${place}]` : numberOf(plan, place)),
    inverse: (k) => (constants[pivots[k]!] === 0 ? `f[${places + k}]` : inverseOf(plan, k)),
  };
}

/** A product; a factor of +1 or −1 costs nothing and changes no bit but the sign. */
function times(a: string, b: string): string {
  if (a === "1") return b;
  if (b === "1") return a;
  if (a === "-1") return `(-(${b}))`;
  if (b === "-1") return `(-(${a}))`;
  return `${a}*${b}`;
}

function againText(plan: Elimination): string {
  const { value, inverse } = keptBy(plan);
  return substitutionText(plan, value, inverse);
}

function substitutionText(
  plan: Elimination,
  value: (place: number) => string,
  inverse: (k: number) => string,
): string {
  const { rowOf, columnOf, rowStarts, rowPlaces, rowColumns, belowStarts, belowPlaces, belowRows } = plan;
  const size = rowOf.length;
  const lines: string[] = [];
  const fetched = new Set<number>();
  const load = (row: number) => {
    if (!fetched.has(row)) lines.push(`let w${row}=-b[${row}];`);
    fetched.add(row);
  };
  for (let k = 0; k < size; k++) {
    load(rowOf[k]!);
    for (let s = belowStarts[k]!; s < belowStarts[k + 1]!; s++) {
      load(belowRows[s]!);
      lines.push(`w${belowRows[s]}-=${times(value(belowPlaces[s]!), `w${rowOf[k]}`)};`);
    }
  }
  for (let k = size - 1; k >= 0; k--) {
    let sum = `w${rowOf[k]}`;
    for (let s = rowStarts[k]!; s < rowStarts[k + 1]!; s++) {
      sum += `-${times(value(rowPlaces[s]!), `x${rowColumns[s]}`)}`;
    }
    lines.push(`const x${columnOf[k]}=${times(`(${sum})`, inverse(k))};`);
    lines.push(`d[${columnOf[k]}]=x${columnOf[k]};`);
  }
  return lines.join("\n");
}

function monitorText(plan: Elimination): string {
  const { anchors, changed, pivots, columnOf } = plan;
  const lines: string[] = [];
  for (const row of changed) {
    lines.push(`if(!(g${row}<=${MOST_GROWTH}*Math.abs(a[${anchors[row]}])))return 0;`);
  }
  const strands: string[] = ["0", "0", "0", "0"];
  pivots.forEach((place, k) => {
    strands[k & 3] += `+(${numberOf(plan, place)}+x${columnOf[k]})`;
  });
  lines.push(
    `const t=${strands[0]}+(${strands[1]})+((${strands[2]})+(${strands[3]}));`,
    "return t-t===0?1:0;",
  );
  return lines.join("\n");
}

function transposedText(plan: Elimination): string {
  const { value, inverse } = keptBy(plan);
  const { rowOf, columnOf, rowStarts, rowPlaces, rowColumns } = plan;
  const { belowStarts, belowPlaces, belowRows } = plan;
  const size = rowOf.length;
  const lines: string[] = [];
  for (let j = 0; j < size; j++) lines.push(`let w${j}=b[${j}];`);
  for (let k = 0; k < size; k++) {
    lines.push(`w${columnOf[k]}=${times(`w${columnOf[k]}`, inverse(k))};`);
    for (let s = rowStarts[k]!; s < rowStarts[k + 1]!; s++) {
      lines.push(`w${rowColumns[s]}-=${times(value(rowPlaces[s]!), `w${columnOf[k]}`)};`);
    }
  }
  for (let k = size - 1; k >= 0; k--) {
    let sum = `w${columnOf[k]}`;
    for (let s = belowStarts[k]!; s < belowStarts[k + 1]!; s++) {
      sum += `-${times(value(belowPlaces[s]!), `x${belowRows[s]}`)}`;
    }
    lines.push(`const x${rowOf[k]}=${sum};`, `d[${rowOf[k]}]=x${rowOf[k]};`);
  }
  return lines.join("\n");
}
