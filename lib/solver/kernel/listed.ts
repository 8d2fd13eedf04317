import type { Elimination, SparseShape } from "../elimination";
import { GOOD_BACKWARD_ERROR, type Kernel } from "./kernel";

/** An elimination carried out from its list of operations; for circuits of any size, and where code may not be generated. */
export class ListedKernel implements Kernel {
  private readonly work: Float64Array;

  constructor(
    private readonly shape: SparseShape,
    private readonly plan: Elimination,
  ) {
    this.work = new Float64Array(shape.size);
  }

  solve(a: Float64Array, b: Float64Array, d: Float64Array, f: Float64Array): boolean {
    this.factorise(a, f);
    this.solveAgain(b, d, f);
    return this.isGood(a, b, d);
  }

  private factorise(a: Float64Array, f: Float64Array): void {
    const { factor, pivots, places } = this.plan;
    f.set(a);
    f.fill(0, a.length, places);
    let at = 0;
    for (let k = 0; k < pivots.length; k++) {
      const inverse = 1 / f[factor[at]!]!;
      const below = factor[at + 1]!;
      const right = factor[at + 2]!;
      const row = at + 3;
      at = row + right;
      f[places + k] = inverse;
      for (let i = 0; i < below; i++) {
        const place = factor[at++]!;
        const multiplier = f[place]! * inverse;
        f[place] = multiplier;
        for (let j = 0; j < right; j++) f[factor[at + j]!]! -= multiplier * f[factor[row + j]!]!;
        at += right;
      }
    }
  }

  solveAgain(b: Float64Array, d: Float64Array, f: Float64Array): void {
    const { work } = this;
    const { rowOf, columnOf, rowStarts, rowPlaces, rowColumns, places } = this.plan;
    const { belowStarts, belowPlaces, belowRows } = this.plan;
    const { size } = this.shape;
    for (let i = 0; i < size; i++) work[i] = -b[i]!;
    for (let k = 0; k < size; k++) {
      const known = work[rowOf[k]!]!;
      const end = belowStarts[k + 1]!;
      for (let s = belowStarts[k]!; s < end; s++) work[belowRows[s]!]! -= f[belowPlaces[s]!]! * known;
    }
    for (let k = size - 1; k >= 0; k--) {
      let sum = work[rowOf[k]!]!;
      const end = rowStarts[k + 1]!;
      for (let s = rowStarts[k]!; s < end; s++) sum -= f[rowPlaces[s]!]! * d[rowColumns[s]!]!;
      d[columnOf[k]!] = sum * f[places + k]!;
    }
  }

  solveTransposed(b: Float64Array, d: Float64Array, f: Float64Array): void {
    const { work } = this;
    const { rowOf, columnOf, rowStarts, rowPlaces, rowColumns, places } = this.plan;
    const { belowStarts, belowPlaces, belowRows } = this.plan;
    const { size } = this.shape;
    for (let j = 0; j < size; j++) work[j] = b[j]!;
    for (let k = 0; k < size; k++) {
      const known = work[columnOf[k]!]! * f[places + k]!;
      work[columnOf[k]!] = known;
      const end = rowStarts[k + 1]!;
      for (let s = rowStarts[k]!; s < end; s++) work[rowColumns[s]!]! -= f[rowPlaces[s]!]! * known;
    }
    for (let k = size - 1; k >= 0; k--) {
      let sum = work[columnOf[k]!]!;
      const end = belowStarts[k + 1]!;
      for (let s = belowStarts[k]!; s < end; s++) sum -= f[belowPlaces[s]!]! * d[belowRows[s]!]!;
      d[rowOf[k]!] = sum;
    }
  }

  private isGood(a: Float64Array, b: Float64Array, d: Float64Array): boolean {
    const { work } = this;
    const { rows, columns, size } = this.shape;
    const { anchors } = this.plan;
    let longest = 0;
    for (let i = 0; i < size; i++) {
      work[i] = b[i]!;
      longest = Math.max(longest, Math.abs(d[i]!));
    }
    if (!(longest < Number.POSITIVE_INFINITY)) return false;
    for (let k = 1; k < a.length; k++) work[rows[k]!]! += a[k]! * d[columns[k]!]!;
    for (let i = 0; i < size; i++) {
      const whole = Math.abs(a[anchors[i]!]!) * longest + Math.abs(b[i]!);
      if (!(Math.abs(work[i]!) <= GOOD_BACKWARD_ERROR * whole)) return false;
    }
    return true;
  }
}
