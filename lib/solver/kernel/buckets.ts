/**
 * Items 0 … size − 1 sorted by a small count, as doubly linked lists over arrays: moving an item or finding those of one count
 * takes no search. Lists are in the order of insertion, so that of a long chain both ends are taken in turn, and the work on one need
 * not wait for that on the other.
 */
export class Buckets {
  /** First item of each count, −1 for none. */
  private readonly heads: Int32Array;
  private readonly tails: Int32Array;
  private readonly following: Int32Array;
  private readonly preceding: Int32Array;
  private readonly counts: Int32Array;

  constructor(size: number) {
    this.heads = new Int32Array(size + 1).fill(-1);
    this.tails = new Int32Array(size + 1).fill(-1);
    this.following = new Int32Array(size).fill(-1);
    this.preceding = new Int32Array(size).fill(-1);
    this.counts = new Int32Array(size).fill(-1);
  }

  /** The first item of a count, −1 where there is none. */
  first(count: number): number {
    return this.heads[count]!;
  }

  /** The item after one in its list, −1 at the end. */
  next(item: number): number {
    return this.following[item]!;
  }

  put(item: number, count: number): void {
    if (this.counts[item] === count) return;
    if (this.counts[item] !== -1) this.take(item);
    const tail = this.tails[count]!;
    this.preceding[item] = tail;
    this.following[item] = -1;
    if (tail === -1) this.heads[count] = item;
    else this.following[tail] = item;
    this.tails[count] = item;
    this.counts[item] = count;
  }

  take(item: number): void {
    const before = this.preceding[item]!;
    const after = this.following[item]!;
    if (before === -1) this.heads[this.counts[item]!] = after;
    else this.following[before] = after;
    if (after === -1) this.tails[this.counts[item]!] = before;
    else this.preceding[after] = before;
    this.counts[item] = -1;
  }
}
