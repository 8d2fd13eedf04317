/**
 * Philox4x32-10, a counter-based generator: a keyed bijection of 128-bit counters, so that any draw can be computed alone. Source:
 * Salmon, Moraes, Dror and Shaw, Parallel random numbers: as easy as 1, 2, 3, SC11 (2011), section 3.3; multipliers and Weyl
 * constants are those of its reference code.
 */

const MULTIPLIER_0 = 0xd2511f53;
const MULTIPLIER_1 = 0xcd9e8d57;
/** The golden ratio and √3 − 1 as 32-bit fractions. */
const WEYL_0 = 0x9e3779b9;
const WEYL_1 = 0xbb67ae85;
const ROUNDS = 10;

/** Four words of 32 bits, unsigned. */
export type Counter = readonly [number, number, number, number];
export type Key = readonly [number, number];

/** The four random words that belong to a counter under a key. */
export function philox(counter: Counter, key: Key): Counter {
  let [a, b, c, d] = counter;
  let [k, l] = key;
  for (let round = 0; round < ROUNDS; round++) {
    const highA = highProduct(MULTIPLIER_0, a);
    const highC = highProduct(MULTIPLIER_1, c);
    const lowA = Math.imul(MULTIPLIER_0, a) >>> 0;
    const lowC = Math.imul(MULTIPLIER_1, c) >>> 0;
    a = (highC ^ b ^ k) >>> 0;
    b = lowC;
    c = (highA ^ d ^ l) >>> 0;
    d = lowA;
    k = (k + WEYL_0) >>> 0;
    l = (l + WEYL_1) >>> 0;
  }
  return [a, b, c, d];
}

/** The upper 32 bits of the 64-bit product of two unsigned words. */
function highProduct(x: number, y: number): number {
  const xHigh = x >>> 16;
  const xLow = x & 0xffff;
  const yHigh = y >>> 16;
  const yLow = y & 0xffff;
  const middle = xHigh * yLow + ((xLow * yLow) >>> 16);
  const other = xLow * yHigh + (middle & 0xffff);
  return (xHigh * yHigh + Math.floor(middle / 0x10000) + Math.floor(other / 0x10000)) >>> 0;
}

/** A number strictly between 0 and 1 from 52 of the bits of two words, each of 2^52 values equally likely. */
export function fraction(high: number, low: number): number {
  return ((high >>> 6) * 0x4000000 + (low >>> 6) + 0.5) / 0x10000000000000;
}
