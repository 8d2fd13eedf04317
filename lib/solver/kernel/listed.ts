import type { Elimination, SparseShape } from "../elimination";
import { type Kernel, MOST_GROWTH } from "./kernel";

/** Numbers of a step that has one row below and one column right, as along a chain of nets. */
const SINGLE = 6;

/** An elimination carried out from its list of operations; for circuits of any size, and where code may not be generated. */
export class ListedKernel implements Kernel {
  private readonly work: Float64Array;
  private readonly growth: Float64Array;
  /** Where stretches of steps end, in turn of others and of singles, which go without inner loops; the first is of others. */
  private readonly ends: Int32Array;
  /** Of each step where its operations begin. */
  private readonly begins: Int32Array;
  /** Of each single: the places of pivot, multiplier, right entry and changed entry, its row and the row below. */
  private readonly singles: Int32Array;

  constructor(
    private readonly shape: SparseShape,
    private readonly plan: Elimination,
  ) {
    const { factor, pivots, rowOf, belowRows, belowStarts } = plan;
    const ends: number[] = [];
    this.work = new Float64Array(shape.size);
    this.growth = new Float64Array(shape.size);
    this.begins = new Int32Array(pivots.length);
    this.singles = new Int32Array(SINGLE * pivots.length);
    let at = 0;
    let wasSingle = false;
    for (let k = 0; k < pivots.length; k++) {
      const below = factor[at + 1]!;
      const right = factor[at + 2]!;
      const isSingle = below === 1 && right === 1;
      if (isSingle !== wasSingle) ends.push(k);
      wasSingle = isSingle;
      this.begins[k] = at;
      if (isSingle) {
        const [pivot, entry, multiplier, changed] = [0, 3, 4, 5].map((j) => factor[at + j]!);
        const rows = [rowOf[k]!, belowRows[belowStarts[k]!]!];
        this.singles.set([pivot!, multiplier!, entry!, changed!, ...rows], SINGLE * k);
      }
      at += 3 + right + below * (1 + right);
    }
    this.ends = Int32Array.from([...ends, pivots.length]);
  }

  solve(a: Float64Array, b: Float64Array, d: Float64Array, f: Float64Array): boolean {
    const { work, growth, ends } = this;
    const { places } = this.plan;
    const { size } = this.shape;
    growth.fill(0);
    for (let k = 0; k < a.length; k++) f[k] = a[k]!;
    f.fill(0, a.length, places);
    for (let i = 0; i < size; i++) work[i] = -b[i]!;
    for (let e = 0, from = 0; e < ends.length; e++) {
      const to = ends[e]!;
      if ((e & 1) === 1) this.eliminateSingles(from, to, f);
      else this.eliminate(from, to, f);
      from = to;
    }
    return this.substituteBack(d, f) && this.isGrowthSmall(a);
  }

  /** Factorises and carries the right side along. */
  private eliminate(from: number, to: number, f: Float64Array): void {
    const { growth, work } = this;
    const { factor, rowOf, places, belowRows, belowStarts } = this.plan;
    for (let k = from; k < to; k++) {
      let at = this.begins[k]!;
      const inverse = 1 / f[factor[at]!]!;
      const right = factor[at + 2]!;
      const row = at + 3;
      at = row + right;
      f[places + k] = inverse;
      const known = work[rowOf[k]!]!;
      const end = belowStarts[k + 1]!;
      for (let s = belowStarts[k]!; s < end; s++) {
        const place = factor[at++]!;
        const below = belowRows[s]!;
        const multiplier = f[place]! * inverse;
        f[place] = multiplier;
        work[below]! -= multiplier * known;
        let grown = growth[below]!;
        for (let j = 0; j < right; j++) {
          const product = multiplier * f[factor[row + j]!]!;
          f[factor[at + j]!]! -= product;
          grown += Math.abs(product);
        }
        growth[below] = grown;
        at += right;
      }
    }
  }

  private eliminateSingles(from: number, to: number, f: Float64Array): void {
    const { growth, work, singles } = this;
    const { places } = this.plan;
    for (let k = from, s = SINGLE * from; k < to; k++, s += SINGLE) {
      const inverse = 1 / f[singles[s]!]!;
      const place = singles[s + 1]!;
      const below = singles[s + 5]!;
      const multiplier = f[place]! * inverse;
      const product = multiplier * f[singles[s + 2]!]!;
      f[singles[s + 3]!]! -= product;
      f[places + k] = inverse;
      f[place] = multiplier;
      work[below]! -= multiplier * work[singles[s + 4]!]!;
      growth[below]! += Math.abs(product);
    }
  }

  solveAgain(b: Float64Array, d: Float64Array, f: Float64Array): void {
    const { work } = this;
    const { rowOf, belowStarts, belowPlaces, belowRows } = this.plan;
    const { size } = this.shape;
    for (let i = 0; i < size; i++) work[i] = -b[i]!;
    for (let k = 0; k < size; k++) {
      const known = work[rowOf[k]!]!;
      const end = belowStarts[k + 1]!;
      for (let s = belowStarts[k]!; s < end; s++) work[belowRows[s]!]! -= f[belowPlaces[s]!]! * known;
    }
    this.substituteBack(d, f);
  }

  /** From the right side in `work`; whether pivots and solution are finite. */
  private substituteBack(d: Float64Array, f: Float64Array): boolean {
    const { work } = this;
    const { rowOf, columnOf, rowStarts, rowPlaces, rowColumns, places, pivots } = this.plan;
    let all = 0;
    let end = rowStarts[this.shape.size]!;
    for (let k = this.shape.size - 1; k >= 0; k--) {
      let sum = work[rowOf[k]!]!;
      const start = rowStarts[k]!;
      for (let s = start; s < end; s++) sum -= f[rowPlaces[s]!]! * d[rowColumns[s]!]!;
      end = start;
      const value = sum * f[places + k]!;
      d[columnOf[k]!] = value;
      all += (f[pivots[k]!]! + value) * 0;
    }
    return all === 0;
  }

  private isGrowthSmall(a: Float64Array): boolean {
    const { growth } = this;
    const { anchors, changed } = this.plan;
    for (let k = 0; k < changed.length; k++) {
      const row = changed[k]!;
      if (!(growth[row]! <= MOST_GROWTH * Math.abs(a[anchors[row]!]!))) return false;
    }
    return true;
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
}
