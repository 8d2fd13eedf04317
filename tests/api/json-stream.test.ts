import { describe, expect, it } from "vitest";
import { jsonStream, piecesOf } from "@/lib/api/json-stream";

/** Plain data of every shape, with lists on both sides of the length that is written at once. */
const VALUES: readonly unknown[] = [
  null,
  0.1,
  -0,
  Number.NaN,
  'a "quoted" text \u2028 Ω',
  [],
  {},
  [[]],
  { empty: [], nothing: {}, gone: undefined, none: null },
  ["a", 1, null, { b: [true, false] }],
  Array.from({ length: 4_096 }, (_, i) => i / 3),
  Array.from({ length: 4_097 }, (_, i) => (i % 5 === 0 ? null : i / 7)),
  { traces: [{ name: "v", values: Array.from({ length: 20_000 }, (_, i) => 1 / (i + 1)) }], tail: "end" },
  Array.from({ length: 10_000 }, (_, point) => ({ point, unsettled: ["s"] })),
  JSON.parse('{"__proto__": [1, 2], "toString": {"constructor": null}}'),
];

describe("a document in pieces", () => {
  it.each(VALUES.map((value) => [JSON.stringify(value).slice(0, 40), value]))("is that of %s", (_, value) => {
    expect([...piecesOf(value)].join("")).toBe(JSON.stringify(value));
  });

  it("comes in parts of moderate length, and says once when all of it is read", async () => {
    const value = { values: Array.from({ length: 200_000 }, (_, i) => Math.sqrt(i)) };
    let ended = 0;
    const sizes: number[] = [];
    const bytes: Uint8Array[] = [];
    for await (const part of jsonStream(value, () => ended++)) {
      sizes.push(part.length);
      bytes.push(part);
    }
    expect(Buffer.concat(bytes).toString()).toBe(JSON.stringify(value));
    expect(Math.max(...sizes)).toBeLessThan(300_000);
    expect(ended).toBe(1);
  });

  it("says so when it is given up", async () => {
    let ended = 0;
    const reader = jsonStream({ values: new Array(100_000).fill(1.5) }, () => ended++).getReader();
    await reader.read();
    await reader.cancel();
    expect(ended).toBe(1);
  });
});
