import type { Elimination, SparseShape } from "../elimination";
import { type Kernel, MOST_GROWTH } from "./kernel";

/** An elimination carried out from its list of operations; for circuits of any size, and where code may not be generated. */
export class ListedKernel implements Kernel {
  private readonly work: Float64Array;
  private readonly growth: Float64Array;
  private readonly strands = new Float64Array(4);

  constructor(
    private readonly shape: SparseShape,
    private readonly plan: Elimination,
  ) {
    this.work = new Float64Array(shape.size);
    this.growth = new Float64Array(shape.size);
  }

  solve(a: Float64Array, b: Float64Array, d: Float64Array, f: Float64Array): boolean {
    this.factorise(a, f);
    this.solveAgain(b, d, f);
    return this.isGood(a, d, f);
  }

  private factorise(a: Float64Array, f: Float64Array): void {
    const { growth } = this;
    const { factor, pivots, places, belowRows } = this.plan;
    growth.fill(0);
    f.set(a);
    f.fill(0, a.length, places);
    let at = 0;
    let s = 0;
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
        let grown = growth[belowRows[s]!]!;
        for (let j = 0; j < right; j++) {
          const product = multiplier * f[factor[row + j]!]!;
          f[factor[at + j]!]! -= product;
          grown += Math.abs(product);
        }
        growth[belowRows[s++]!] = grown;
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

  /** The sum that shows whether all is finite runs in four strands: in generated code, one alone would be waited for. */
  private isGood(a: Float64Array, d: Float64Array, f: Float64Array): boolean {
    const { growth, strands } = this;
    const { anchors, changed, pivots, columnOf } = this.plan;
    for (let k = 0; k < changed.length; k++) {
      const row = changed[k]!;
      if (!(growth[row]! <= MOST_GROWTH * Math.abs(a[anchors[row]!]!))) return false;
    }
    strands.fill(0);
    for (let k = 0; k < pivots.length; k++) strands[k & 3]! += f[pivots[k]!]! + d[columnOf[k]!]!;
    const sum = strands[0]! + strands[1]! + (strands[2]! + strands[3]!);
    return sum - sum === 0;
  }
}
