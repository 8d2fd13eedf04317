/** Disjoint sets of 0 … size − 1 with union by size and path halving (Tarjan and van Leeuwen 1984): nearly linear. */
export class UnionFind {
  private readonly parent: Int32Array;
  private readonly sizes: Int32Array;

  constructor(size: number) {
    this.parent = Int32Array.from({ length: size }, (_, i) => i);
    this.sizes = new Int32Array(size).fill(1);
  }

  /** The one member that stands for the set of `i`. */
  find(i: number): number {
    let at = i;
    while (this.parent[at] !== at) {
      this.parent[at] = this.parent[this.parent[at]!]!;
      at = this.parent[at]!;
    }
    return at;
  }

  /** Joins two sets; false where they were one already. */
  union(i: number, j: number): boolean {
    let a = this.find(i);
    let b = this.find(j);
    if (a === b) return false;
    if (this.sizes[a]! < this.sizes[b]!) [a, b] = [b, a];
    this.parent[b] = a;
    this.sizes[a]! += this.sizes[b]!;
    return true;
  }
}
