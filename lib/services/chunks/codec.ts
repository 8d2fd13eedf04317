/** Values in one chunk, at most. */
export const CHUNK_POINTS = 4096;

const BYTES = 8;
const littleEndian = new Uint8Array(new Uint16Array([1]).buffer)[0] === 1;

/** A column cut for storing: `data` is `encode` of at most 4096 values, the extremes are over its numbers. */
export interface Chunk {
  readonly index: number;
  readonly count: number;
  readonly minimum: number | null;
  readonly maximum: number | null;
  /** Memory of its own, so that it can be handed from thread to thread. */
  readonly data: Uint8Array<ArrayBuffer>;
}

/**
 * Byte-shuffled little-endian Float64: first the lowest byte of every value, then the next, and so on. Neighbouring values of a
 * smooth trace share their high bytes, which then lie together and compress well. Every bit is kept, NaN included.
 */
export function encode(values: Float64Array): Uint8Array<ArrayBuffer> {
  const plain = littleEndianBytes(values);
  const shuffled = new Uint8Array(plain.length);
  for (let byte = 0, to = 0; byte < BYTES; byte++) {
    for (let from = byte; from < plain.length; from += BYTES) shuffled[to++] = plain[from]!;
  }
  return shuffled;
}

/** The inverse of `encode`. Throws a RangeError when `data` is not a whole number of values. */
export function decode(data: Uint8Array): Float64Array {
  const values = new Float64Array(Math.floor(data.length / BYTES));
  decodeInto(values, 0, data);
  return values;
}

/** The same into a column, from its value `at` on. */
export function decodeInto(column: Float64Array, at: number, data: Uint8Array): void {
  if (data.length % BYTES !== 0) throw new RangeError(`A chunk of ${data.length} bytes is not whole.`);
  const count = data.length / BYTES;
  const plain = new Uint8Array(column.buffer, column.byteOffset + BYTES * at, data.length);
  const [b, c, d, e, f, g, h] = [count, 2 * count, 3 * count, 4 * count, 5 * count, 6 * count, 7 * count];
  // All bytes of a value at once: written in order, this takes half the time of byte after byte.
  for (let i = 0, to = 0; i < count; i++, to += BYTES) {
    plain[to] = data[i]!;
    plain[to + 1] = data[i + b]!;
    plain[to + 2] = data[i + c]!;
    plain[to + 3] = data[i + d]!;
    plain[to + 4] = data[i + e]!;
    plain[to + 5] = data[i + f]!;
    plain[to + 6] = data[i + g]!;
    plain[to + 7] = data[i + h]!;
  }
  if (littleEndian) return;
  const view = new DataView(plain.buffer, plain.byteOffset, plain.length);
  for (let i = 0; i < count; i++) column[at + i] = view.getFloat64(i * BYTES, true);
}

function littleEndianBytes(values: Float64Array): Uint8Array {
  if (littleEndian) return new Uint8Array(values.buffer, values.byteOffset, values.byteLength);
  const view = new DataView(new ArrayBuffer(values.length * BYTES));
  for (const [i, value] of values.entries()) view.setFloat64(i * BYTES, value, true);
  return new Uint8Array(view.buffer);
}

/** Cuts a column of any length into chunks of 4096 values; the last may be shorter. */
export function cut(column: Float64Array): Chunk[] {
  const chunks: Chunk[] = [];
  for (let from = 0, index = 0; from < column.length; from += CHUNK_POINTS, index++) {
    const values = column.subarray(from, from + CHUNK_POINTS);
    chunks.push({ index, count: values.length, ...extremes(values), data: encode(values) });
  }
  return chunks;
}

function extremes(values: Float64Array): { minimum: number | null; maximum: number | null } {
  let minimum = Number.POSITIVE_INFINITY;
  let maximum = Number.NEGATIVE_INFINITY;
  for (const value of values) {
    if (value < minimum) minimum = value;
    if (value > maximum) maximum = value;
  }
  return minimum <= maximum ? { minimum, maximum } : { minimum: null, maximum: null };
}
