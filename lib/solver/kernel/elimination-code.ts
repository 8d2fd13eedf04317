import type { Home, StraightCode } from "@/lib/circuit/code/straight";
import type { Elimination, SparseShape } from "../elimination";
import { MOST_GROWTH } from "./kernel";

/** How an elimination finds its matrix and right side: the variables of a place and of a row. */
export interface Given {
  readonly jacobian: (place: number) => string;
  readonly residual: (row: number) => string;
}

/**
 * Homes of the letters that the code below uses besides those of what is given: f for the factors, of which values and inverse pivots
 * are kept, d for the solution. `factors` and `solution` tell where these begin.
 */
export function eliminationHomes(
  { places, rowOf }: Elimination,
  factors: number,
  solution: number,
): Record<"f" | "d", Home> {
  return {
    f: { start: factors, kept: places + rowOf.length },
    d: { start: solution, kept: Number.POSITIVE_INFINITY },
  };
}

/** Writes factorisation, solution and the test of the pivots, which are demands, as straight code. */
export class EliminationCode {
  private readonly size: number;

  constructor(
    private readonly code: StraightCode,
    private readonly shape: SparseShape,
    private readonly plan: Elimination,
    private readonly given: Given,
  ) {
    this.size = plan.rowOf.length;
  }

  /** Factorises, solves and judges. */
  write(): void {
    this.factorise();
    this.substitute();
    this.judge();
  }

  /** Solves with the factors at hand. */
  writeAgain(): void {
    this.substitute();
  }

  /** Solves with the factors at hand and the matrix transposed; the right side keeps its sign. */
  writeTransposed(): void {
    const { code, plan, given } = this;
    const { rowOf, columnOf, rowStarts, rowPlaces, rowColumns, belowStarts, belowPlaces, belowRows } = plan;
    const begun = new Set<number>();
    const held = (column: number) => (begun.has(column) ? this.right(column) : given.residual(column));
    for (let k = 0; k < this.size; k++) {
      const column = columnOf[k]!;
      code.set(this.right(column), times(held(column), this.inverseNumber(k)));
      begun.add(column);
      for (let s = rowStarts[k]!; s < rowStarts[k + 1]!; s++) {
        const other = rowColumns[s]!;
        code.set(
          this.right(other),
          `${held(other)}-${times(this.number(rowPlaces[s]!), this.right(column))}`,
        );
        begun.add(other);
      }
    }
    for (let k = this.size - 1; k >= 0; k--) {
      let sum = this.right(columnOf[k]!);
      for (let s = belowStarts[k]!; s < belowStarts[k + 1]!; s++) {
        sum += `-${times(this.number(belowPlaces[s]!), `d${belowRows[s]}`)}`;
      }
      code.set(`d${rowOf[k]}`, sum);
    }
  }

  /** Variables of the array of factors: a value, the inverse of a pivot, a row's right side, and what is subtracted from a row. */
  private value(place: number): string {
    return `f${place}`;
  }

  private inverse(k: number): string {
    return `f${this.plan.places + k}`;
  }

  private right(row: number): string {
    return `f${this.plan.places + this.size + row}`;
  }

  private grown(row: number): string {
    return `f${this.plan.places + 2 * this.size + row}`;
  }

  private number(place: number): string {
    const constant = this.plan.constants[place]!;
    return constant === 0 ? this.value(place) : `${constant}`;
  }

  private inverseNumber(k: number): string {
    const constant = this.plan.constants[this.plan.pivots[k]!]!;
    return constant === 0 ? this.inverse(k) : `${constant}`;
  }

  private factorise(): void {
    const { code, plan, shape } = this;
    const { factor, pivots, belowRows, constants } = plan;
    const fetched = new Set<number>();
    const growing = new Set<number>();
    const beginning = (place: number) => (place < shape.rows.length ? this.given.jacobian(place) : "0");
    const load = (place: number) => {
      if (constants[place] === 0 && !fetched.has(place)) code.set(this.value(place), beginning(place));
      fetched.add(place);
    };
    let at = 0;
    let s = 0;
    for (let k = 0; k < pivots.length; k++) {
      const pivot = factor[at]!;
      const below = factor[at + 1]!;
      const right = factor[at + 2]!;
      const row = at + 3;
      at = row + right;
      load(pivot);
      if (constants[pivot] === 0) code.set(this.inverse(k), `1/${this.value(pivot)}`);
      for (let j = 0; j < right; j++) load(factor[row + j]!);
      for (let i = 0; i < below; i++) {
        const multiplier = factor[at++]!;
        load(multiplier);
        if (constants[multiplier] === 0) {
          code.set(this.value(multiplier), times(this.value(multiplier), this.inverseNumber(k)));
        }
        const target = belowRows[s++]!;
        for (let j = 0; j < right; j++) {
          const place = factor[at + j]!;
          const q = code.let(times(this.number(multiplier), this.number(factor[row + j]!)));
          const before = fetched.has(place) ? this.value(place) : beginning(place);
          fetched.add(place);
          code.set(this.value(place), `${before}-${q}`);
          const grown = this.grown(target);
          code.set(grown, growing.has(target) ? `${grown}+abs(${q})` : `abs(${q})`);
          growing.add(target);
        }
        at += right;
      }
    }
  }

  private substitute(): void {
    const { code, plan, given } = this;
    const { rowOf, columnOf, rowStarts, rowPlaces, rowColumns, belowStarts, belowPlaces, belowRows } = plan;
    const begun = new Set<number>();
    const held = (row: number) => (begun.has(row) ? this.right(row) : `-${given.residual(row)}`);
    for (let k = 0; k < this.size; k++) {
      const row = rowOf[k]!;
      if (belowStarts[k] === belowStarts[k + 1]) continue;
      if (!begun.has(row)) code.set(this.right(row), held(row));
      begun.add(row);
      for (let s = belowStarts[k]!; s < belowStarts[k + 1]!; s++) {
        const below = belowRows[s]!;
        code.set(this.right(below), `${held(below)}-${times(this.number(belowPlaces[s]!), this.right(row))}`);
        begun.add(below);
      }
    }
    for (let k = this.size - 1; k >= 0; k--) {
      let sum = held(rowOf[k]!);
      for (let s = rowStarts[k]!; s < rowStarts[k + 1]!; s++) {
        sum += `-${times(this.number(rowPlaces[s]!), `d${rowColumns[s]}`)}`;
      }
      code.set(`d${columnOf[k]}`, times(`(${sum})`, this.inverseNumber(k)));
    }
  }

  private judge(): void {
    const { code, plan, given } = this;
    const { anchors, changed, pivots, columnOf } = plan;
    for (const row of changed) {
      const most = `${MOST_GROWTH}*abs(${given.jacobian(anchors[row]!)})`;
      code.demand(`${this.grown(row)}<=${most}`);
    }
    const strands: string[] = ["0", "0", "0", "0"];
    pivots.forEach((place, k) => {
      strands[k & 3] += `+(${this.number(place)}+d${columnOf[k]})`;
    });
    const sum = code.let(`${strands[0]}+(${strands[1]})+((${strands[2]})+(${strands[3]}))`);
    code.demand(`abs(${sum}-${sum})<=0`);
  }
}

/** A product; a factor of +1 or −1 costs nothing and changes no bit but the sign. */
function times(a: string, b: string): string {
  if (a === "1") return b;
  if (b === "1") return a;
  if (a === "-1") return `(-(${b}))`;
  if (b === "-1") return `(-(${a}))`;
  return `${a}*${b}`;
}
