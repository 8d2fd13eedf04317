/** A repeatable stream of random choices (Lehmer's generator of 1951 with the multiplier 48271; the first hundred are thrown away). */
export class Stream {
  private state: number;

  constructor(seed: number) {
    this.state = (seed * 7919 + 1) % 2147483647;
    for (let k = 0; k < 100; k++) this.next();
  }

  /** In [0, 1). */
  next(): number {
    this.state = (this.state * 48271) % 2147483647;
    return this.state / 2147483647;
  }

  /** An integer in [low, high]. */
  whole(low: number, high: number): number {
    return low + Math.floor((high - low + 1) * this.next());
  }

  chance(of: number): boolean {
    return this.next() < of;
  }

  pick<T>(from: readonly T[]): T {
    return from[Math.floor(from.length * this.next())]!;
  }

  between(low: number, high: number): number {
    return round(low + (high - low) * this.next());
  }

  /** Evenly spread over the decades from `low` to `high`. */
  decades(low: number, high: number): number {
    return round(low * (high / low) ** this.next());
  }
}

/** Three digits, so that a netlist is short and its decimal the same number. */
function round(value: number): number {
  return Number(value.toPrecision(3));
}
