import type { Home, StraightCode } from "@/lib/circuit/code/straight";
import { UNIT } from "@/lib/devices/rounding";
import type { Elimination, SparseShape } from "../elimination";

/** Arrays that the code reads and leaves, one after the other, each of the unknowns and ground. */
export const BOUND_ARRAYS = ["weights", "roundings", "doubt", "spread", "error", "change"] as const;

/** Homes of the letters that the code below uses besides f of the factors; `start` tells where the arrays begin. */
export function boundHomes(size: number, start: number): Record<"w" | "n" | "u" | "s" | "e" | "c", Home> {
  const [w, n, u, s, e, c] = BOUND_ARRAYS.map((_, k) => ({
    start: start + k * (size + 1),
    kept: Number.POSITIVE_INFINITY,
  })) as [Home, Home, Home, Home, Home, Home];
  return { w, n, u, s, e, c };
}

/** Writes `bound` of `TriangularBounds` as straight code, with the same operations in the same order. */
export class BoundsCode {
  constructor(
    private readonly code: StraightCode,
    private readonly shape: SparseShape,
    private readonly plan: Elimination,
    private readonly jacobian: (place: number) => string,
  ) {}

  write(): void {
    const { size } = this.shape;
    this.apply(
      Array.from({ length: size }, (_, i) => `u${i}`),
      "e",
    );
    const residues = this.residues();
    const sums = this.sums();
    const rows = residues.map((residue, i) =>
      this.code.let(`${residue}+(s${i}+n${i}*${UNIT}*${sums[i] ?? "0"})`),
    );
    this.apply(rows, "c");
  }

  private size(place: number): string {
    return this.plan.constants[place] === 0 ? `abs(f${place})` : "1";
  }

  private inverse(k: number): string {
    const { constants, pivots, places } = this.plan;
    return constants[pivots[k]!] === 0 ? `abs(f${places + k})` : "1";
  }

  private apply(right: readonly string[], into: "e" | "c"): void {
    const { code } = this;
    const { rowOf, columnOf, rowStarts, rowPlaces, rowColumns, belowStarts, belowPlaces, belowRows } =
      this.plan;
    const work = [...right];
    for (let k = 0; k < work.length; k++) {
      for (let s = belowStarts[k]!; s < belowStarts[k + 1]!; s++) {
        const below = belowRows[s]!;
        work[below] = code.let(`${work[below]}+${this.size(belowPlaces[s]!)}*${work[rowOf[k]!]}`);
      }
    }
    for (let k = work.length - 1; k >= 0; k--) {
      let sum = work[rowOf[k]!]!;
      for (let s = rowStarts[k]!; s < rowStarts[k + 1]!; s++) {
        sum += `+${this.size(rowPlaces[s]!)}*${into}${rowColumns[s]}`;
      }
      code.set(`${into}${columnOf[k]}`, `(${sum})*${this.inverse(k)}`);
    }
  }

  private residues(): string[] {
    const { code } = this;
    const { rowOf, columnOf, rowStarts, rowPlaces, rowColumns, belowStarts, belowPlaces, belowRows } =
      this.plan;
    const { size } = this.shape;
    const into: string[] = Array.from({ length: size }, () => "0");
    const steps = Array.from({ length: size }, () => 4);
    for (let k = 0; k < size; k++) {
      const row = rowOf[k]!;
      let terms = `w${columnOf[k]}/${this.inverse(k)}`;
      for (let s = rowStarts[k]!; s < rowStarts[k + 1]!; s++) {
        terms += `+${this.size(rowPlaces[s]!)}*w${rowColumns[s]}`;
      }
      const sum = code.let(terms);
      into[row] = code.let(`(${into[row]}+${sum})*${steps[row]}*${UNIT}`);
      for (let s = belowStarts[k]!; s < belowStarts[k + 1]!; s++) {
        const below = belowRows[s]!;
        into[below] = code.let(`${into[below]}+${this.size(belowPlaces[s]!)}*${sum}`);
        steps[below]! += 2;
      }
    }
    return into;
  }

  private sums(): string[] {
    const { rows, columns } = this.shape;
    const sums: string[] = [];
    for (let k = 1; k < rows.length; k++) {
      const before = sums[rows[k]!] ?? "0";
      sums[rows[k]!] = this.code.let(`${before}+abs(${this.jacobian(k)})*w${columns[k]}`);
    }
    return sums;
  }
}
