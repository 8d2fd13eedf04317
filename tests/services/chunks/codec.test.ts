import fc from "fast-check";
import { expect, test } from "vitest";
import { CHUNK_POINTS, cut, decode, encode } from "@/lib/services/chunks/codec";

/** Any pattern of 64 bits, so that NaN of every kind, both zeros and denormal numbers come up. */
const anyValues = fc
  .array(fc.bigInt({ min: 0n, max: 2n ** 64n - 1n }), { maxLength: 50 })
  .map((bits) => new Float64Array(new BigUint64Array(bits).buffer));

const bitsOf = (values: Float64Array) => [...new BigUint64Array(values.slice().buffer)];

test("every bit of every value comes back", () => {
  fc.assert(
    fc.property(anyValues, (values) => {
      expect(bitsOf(decode(encode(values)))).toEqual(bitsOf(values));
    }),
  );
});

test("the lowest bytes come first: 1 and -2 by hand", () => {
  // IEEE 754 binary64: 1 is 3ff0 0000 0000 0000, -2 is c000 0000 0000 0000.
  expect([...encode(Float64Array.of(1, -2))]).toEqual([
    0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0xf0, 0, 0x3f, 0xc0,
  ]);
});

test("bytes that lie within a larger memory are read from where they begin", () => {
  const values = Float64Array.of(0.1, -1e-300, Number.MAX_VALUE);
  const around = new Uint8Array(100);
  around.set(encode(values), 13);
  expect(decode(around.subarray(13, 13 + 24))).toEqual(values);
  expect(encode(Float64Array.of(9, ...values).subarray(1))).toEqual(encode(values));
});

test("a piece that is not a whole number of values is refused", () => {
  expect(() => decode(new Uint8Array(12))).toThrow(RangeError);
});

test("a column is cut at 4096 values, and the pieces make it whole again", () => {
  for (const length of [0, 1, CHUNK_POINTS, CHUNK_POINTS + 1, 2 * CHUNK_POINTS]) {
    const column = Float64Array.from({ length }, (_, i) => Math.sin(i));
    const chunks = cut(column);
    expect(chunks.map(({ index }) => index)).toEqual(chunks.map((_, i) => i));
    expect(chunks).toHaveLength(Math.ceil(length / 4096));
    for (const { count, data } of chunks) expect(data.length).toBe(8 * count);
    expect(chunks.flatMap(({ data }) => [...decode(data)])).toEqual([...column]);
  }
});

test("the extremes are over the numbers; where there is none they are null", () => {
  expect(cut(Float64Array.of(Number.NaN, 3, -7, Number.NaN, 2))[0]).toMatchObject({
    minimum: -7,
    maximum: 3,
  });
  expect(cut(Float64Array.of(Number.NaN, Number.NaN))[0]).toMatchObject({ minimum: null, maximum: null });
  expect(cut(Float64Array.of(-0.5))[0]).toMatchObject({ minimum: -0.5, maximum: -0.5 });
});
