import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { type PageState, readPageState, writePageState } from "@/app/(work)/[workspace]/runs/[id]/page-state";

const USUAL: PageState = {
  traces: null,
  families: null,
  x: null,
  y: {},
  zoom: null,
  tab: "curves",
  point: null,
  page: 1,
  failed: false,
  only: null,
  band: true,
  worst: null,
  subject: null,
  setting: null,
};

const read = (text: string) => readPageState(new URLSearchParams(text));

describe("the address of a run's page", () => {
  it("is empty for the usual view", () => {
    expect(writePageState(USUAL)).toBe("");
    expect(read("")).toEqual(USUAL);
  });

  it("gives back every state that it was written from", () => {
    const scale = fc.constantFrom("linear" as const, "logarithmic" as const);
    const count = fc.nat(1_000_000);
    const state: fc.Arbitrary<Required<PageState>> = fc.record({
      traces: fc.option(fc.uniqueArray(fc.constantFrom("out", "S.Q.c.i", "lr.v - ls.v", "a,b"))),
      families: fc.option(fc.uniqueArray(fc.nat(90))),
      x: fc.option(scale),
      y: fc.dictionary(fc.constantFrom("V", "A", "1", "V/K", "K"), scale),
      zoom: fc.option(
        fc
          .tuple(
            fc.double({ min: -1e9, max: 0, noNaN: true }),
            fc.double({ min: 1e-15, max: 1e9, noNaN: true }),
          )
          .map(([from, to]) => ({ from: from === 0 ? 0 : from, to })),
      ),
      tab: fc.constantFrom("curves" as const, "numbers" as const),
      point: fc.option(count),
      page: count.map((n) => n + 1),
      failed: fc.boolean(),
      only: fc.constantFrom(null, { trace: "a,b" }, { family: 7 }),
      band: fc.boolean(),
      worst: fc.option(fc.constantFrom("", "log conformance", "y <= 4 V")),
      subject: fc.option(fc.constantFrom("read:scale", "require:0")),
      setting: fc.option(count),
    });
    fc.assert(
      fc.property(state, (one) => {
        expect(read(writePageState(one))).toEqual({ ...one, y: { ...one.y } });
      }),
    );
  });

  it("leaves as usual what makes no sense in it", () => {
    expect(read("x=cubic&y=V&y=:log&from=3&to=2&point=-1&page=0&tab=secrets&rows=all")).toEqual(USUAL);
    expect(read("from=1&point=1.5&settings=a.b").zoom).toBeNull();
    expect(read("settings=1.x.3").families).toEqual([1, 3]);
  });
});
