import type { Elimination, SparseShape } from "../elimination";

/** Where things begin in the memory, in numbers; `lists` in bytes. */
export interface EliminationStarts {
  readonly jacobian: number;
  readonly residual: number;
  readonly factors: number;
  readonly solution: number;
  readonly lists: number;
}

/**
 * An elimination as a list of addresses for loops of generated code, with the operations of `ListedKernel` in their order. The list has
 * stretches of steps (1 and a count, then eight addresses each, where one row is below and one entry right, else 0 and a count, then
 * records of their own length), the steps of the back substitution, those of a forward substitution, and the rows to be judged.
 */
export class EliminationList {
  readonly numbers: Int32Array;
  /** Bytes at which the parts of the list end. */
  readonly ends: readonly [number, number, number, number];

  constructor(
    private readonly shape: SparseShape,
    private readonly plan: Elimination,
    private readonly starts: EliminationStarts,
  ) {
    const parts = [this.steps(), this.back(), this.forward(), this.judged()];
    const ends: number[] = [];
    let length = 0;
    for (const part of parts) {
      length += part.length;
      ends.push(starts.lists + 4 * length);
    }
    this.ends = ends as unknown as readonly [number, number, number, number];
    this.numbers = Int32Array.from(parts.flat());
  }

  /** The address of a value. */
  factor(place: number): number {
    return 8 * (this.starts.factors + place);
  }

  private inverse(k: number): number {
    return this.factor(this.plan.places + k);
  }

  /** The address of a row's right side. */
  right(row: number): number {
    return this.factor(this.plan.places + this.shape.size + row);
  }

  /** The address of what is subtracted from a row. */
  grown(row: number): number {
    return this.factor(this.plan.places + 2 * this.shape.size + row);
  }

  private steps(): number[] {
    const { factor, pivots, rowOf, belowRows } = this.plan;
    const list: number[] = [];
    let stretch = -1;
    let at = 0;
    let s = 0;
    for (let k = 0; k < pivots.length; k++) {
      const [pivot, below, right] = [factor[at]!, factor[at + 1]!, factor[at + 2]!];
      const rights = Array.from({ length: right }, (_, j) => this.factor(factor[at + 3 + j]!));
      at += 3 + right;
      const kind = below === 1 && right === 1 ? 1 : 0;
      if (stretch < 0 || list[stretch] !== kind) stretch = list.push(kind, 0) - 2;
      list[stretch + 1]! += 1;
      const head = [this.factor(pivot), this.inverse(k), this.right(rowOf[k]!)];
      if (kind === 0) list.push(...head, below, right, ...rights);
      for (let i = 0; i < below; i++, at += 1 + right) {
        const row = belowRows[s++]!;
        const changed = Array.from({ length: right }, (_, j) => this.factor(factor[at + 1 + j]!));
        const target = [this.factor(factor[at]!), this.right(row), this.grown(row), ...changed];
        if (kind === 1) list.push(...head, ...rights);
        list.push(...target);
      }
    }
    return list;
  }

  private back(): number[] {
    const { rowOf, columnOf, rowStarts, rowPlaces, rowColumns, pivots } = this.plan;
    const list: number[] = [];
    for (let k = this.shape.size - 1; k >= 0; k--) {
      const count = rowStarts[k + 1]! - rowStarts[k]!;
      list.push(this.right(rowOf[k]!), this.inverse(k), this.factor(pivots[k]!));
      list.push(8 * (this.starts.solution + columnOf[k]!), count);
      for (let s = rowStarts[k]!; s < rowStarts[k + 1]!; s++) {
        list.push(this.factor(rowPlaces[s]!), 8 * (this.starts.solution + rowColumns[s]!));
      }
    }
    return list;
  }

  private forward(): number[] {
    const { rowOf, belowStarts, belowPlaces, belowRows } = this.plan;
    const list: number[] = [];
    for (let k = 0; k < this.shape.size; k++) {
      const count = belowStarts[k + 1]! - belowStarts[k]!;
      if (count > 0) list.push(this.right(rowOf[k]!), count);
      for (let s = belowStarts[k]!; s < belowStarts[k + 1]!; s++) {
        list.push(this.factor(belowPlaces[s]!), this.right(belowRows[s]!));
      }
    }
    return list;
  }

  private judged(): number[] {
    const { changed, anchors } = this.plan;
    const list: number[] = [];
    for (const row of changed) list.push(this.grown(row), 8 * (this.starts.jacobian + anchors[row]!));
    return list;
  }
}
