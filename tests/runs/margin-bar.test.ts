import { describe, expect, test } from "vitest";
import { marginPlaces } from "@/app/_components/ui/margin-scale";
import { limitsInWords, marginSentence, worstInWords } from "@/app/_components/ui/margin-words";
import { onePrefix } from "@/app/_components/ui/one-prefix";
import { allowedBands } from "@/lib/analyses/allowed-bands";
import type { RequirementDocument } from "@/lib/analyses/result";

const BEND: RequirementDocument = {
  label: "log conformance",
  verdict: "broken",
  margin: -0.00014,
  unit: "V",
  worst: {
    draw: 211,
    at: [
      { knob: "I_sample", unit: "A", value: 1e-8 },
      { knob: "temperature", unit: "K", value: 313.15 },
    ],
  },
  share: null,
  allowed: { low: -0.0005, high: 0.0005 },
  value: { nominal: 0.00031, worst: 0.00064, low: -0.0001, high: 0.00064 },
  windows: [{ knob: "I_sample", low: 1e-8, high: 1e-4 }],
  bounds: { trace: "bend", low: -0.0005, high: 0.0005 },
  reading: null,
  drawn: [0.00031],
};

test("values that lie close together are told with the digits that tell them apart", () => {
  const value = { nominal: -0.9933, worst: -0.991201, low: -0.999912, high: -0.991201 };
  const sentence = marginSentence({
    ...BEND,
    verdict: "holds",
    allowed: { low: -1.025, high: -0.975 },
    value,
  });
  expect(sentence).toContain("all values \u2212999.91 to \u2212991.2\u202fmV");
});

describe("places on a margin bar", () => {
  test("what is allowed and what is found stand on one scale with room at both ends", () => {
    // From −0.5 to 0.64 mV, and a tenth of that at each end: 1.368 mV in all, beginning at −0.614 mV.
    const places = marginPlaces(BEND)!;
    expect(places.allowed.from).toBeCloseTo(0.114 / 1.368, 12);
    expect(places.allowed.to).toBeCloseTo(1.114 / 1.368, 12);
    expect(places.worst).toBeCloseTo(1.254 / 1.368, 12);
    expect(places.spread!.to).toBe(places.worst);
    expect(places.nominal).toBeCloseTo(0.924 / 1.368, 12);
    expect(places.beyond).toEqual({ low: false, high: false });
  });

  test("a band with one limit is open to the end of the bar", () => {
    const value = { nominal: 4.95, worst: 4.92, low: 4.92, high: 5 };
    const places = marginPlaces({ allowed: { low: 4.9, high: null }, value })!;
    expect(places.isOpen).toEqual({ low: false, high: true });
    expect(places.allowed).toEqual({ from: expect.closeTo(0.01 / 0.12, 12), to: 1 });
  });

  test("values far beyond do not shrink the band to nothing: the bar ends before them", () => {
    const value = { nominal: 0, worst: 1000, low: 0, high: 1000 };
    const places = marginPlaces({ allowed: { low: -1, high: 1 }, value })!;
    // From −1 to 1 + 4 · 2 with a tenth more at each end: 12 in all.
    expect(places.allowed.to - places.allowed.from).toBeCloseTo(2 / 12, 12);
    expect(places.worst).toBe(1);
    expect(places.beyond).toEqual({ low: false, high: true });
  });

  test("one value at its limit, nothing known, and no limit", () => {
    const one = { nominal: 2, worst: 2, low: 2, high: 2 };
    expect(marginPlaces({ allowed: { low: null, high: 2 }, value: one })).toMatchObject({ worst: 0.5 });
    const zero = { nominal: 0, worst: 0, low: 0, high: 0 };
    expect(marginPlaces({ allowed: { low: 0, high: null }, value: zero })).toMatchObject({ worst: 0.5 });
    const none = { nominal: null, worst: null, low: null, high: null };
    expect(marginPlaces({ allowed: { low: 0, high: 1 }, value: none })).toMatchObject({
      worst: null,
      spread: null,
    });
    expect(marginPlaces({ allowed: { low: null, high: null }, value: none })).toBeNull();
  });
});

describe("values with one prefix", () => {
  test.each([
    [[0.995, 1.005], "V", 4, ["0.995", "1.005"], "V"],
    [[-0.0005, 0.00064], "V", 3, ["−500", "640"], "µV"],
    [[0.0009999996, 0], "V", 3, ["1", "0"], "mV"],
    [[0, 0], "A", 3, ["0", "0"], "A"],
    [[0.02, 1.5], "1", 3, ["0.02", "1.5"], ""],
  ])("%o %s", (values, unit, digits, texts, shared) => {
    expect(onePrefix(values, unit, digits)).toEqual({ texts, unit: shared });
  });
});

describe("a requirement in words", () => {
  const plain = (text: string) => text.replaceAll("\u202f", " ");

  test("names verdict, worst value with its place, limits, margin and spread", () => {
    expect(plain(marginSentence(BEND))).toBe(
      "log conformance is broken; worst value 640 µV at I_sample 10 nA, temperature 40 °C, draw 211; allowed within ±500 µV; missed by 140 µV; all values −100 to 640 µV, nominal 310 µV.",
    );
  });

  test.each([
    [{ low: null, high: 0.002 }, "at most 2 mV"],
    [{ low: 4.9, high: null }, "at least 4.9 V"],
    [{ low: -0.01, high: 0.01 }, "within ±10 mV"],
    [{ low: 0.99, high: 1.01 }, "0.99 to 1.01 V"],
    [{ low: null, high: null }, ""],
  ])("limits %o", (allowed, words) => {
    expect(plain(limitsInWords({ ...BEND, allowed }))).toBe(words);
  });

  test("a worst value has as many digits as tell how far it is from its limit", () => {
    const at = (worst: number, margin: number) =>
      plain(worstInWords({ ...BEND, margin, value: { ...BEND.value, worst } }));
    expect(at(0.00050003, -3e-8)).toBe("500.0300 µV");
    expect(at(1.1805, 0.0074)).toBe("1.1805 V");
    expect(at(0.0005, 0)).toBe("500 µV");
    expect(at(0, 1)).toBe("0 V");
  });

  test("without data it says so and no more", () => {
    const none = { nominal: null, worst: null, low: null, high: null };
    const sentence = marginSentence({ ...BEND, verdict: "no data", margin: null, worst: null, value: none });
    expect(sentence).toBe("log conformance has no data.");
  });
});

test("bands behind the curves reach over their windows, cut at the ends of the sweep", () => {
  const values = [1e-9, 1e-7, 1e-5];
  const axes = [{ knob: "I_sample", unit: "A", scale: "logarithmic" as const, values }];
  const outer = [{ knob: "temperature", low: 298.15, high: 298.15 }];
  const found = allowedBands({
    axes,
    requirements: [
      BEND,
      { ...BEND, label: "here", windows: outer },
      { ...BEND, label: "elsewhere", bounds: null },
      { ...BEND, label: "of no one limit", bounds: { trace: "bend", low: null, high: null } },
    ],
  });
  const band = { trace: "bend", low: -0.0005, high: 0.0005 };
  expect(found).toEqual([
    { ...band, label: "log conformance", from: 1e-8, to: 1e-5, at: [] },
    { ...band, label: "here", from: 1e-9, to: 1e-5, at: outer },
  ]);
});
