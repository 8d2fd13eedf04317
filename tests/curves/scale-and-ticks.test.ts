import { describe, expect, it } from "vitest";
import { logarithmicFit, type Mapping, placeOf, reasonFor, valueAt } from "@/app/_components/curves/scale";
import { decadeLabels, linearLabels } from "@/app/_components/curves/tick-labels";
import { decadeTicks, linearTicks } from "@/app/_components/curves/ticks";

const LOG: Mapping = { scale: "logarithmic", sign: 1 };
const NEGATIVE: Mapping = { scale: "logarithmic", sign: -1 };
const spaced = (text: string) => text.replaceAll("\u202f", " ");
const labels = ({ texts }: { texts: ReadonlyMap<unknown, string> }) => [...texts.values()].map(spaced);

describe("mapping", () => {
  it("places equal ratios at equal distances on a logarithmic axis", () => {
    const at = (value: number) => placeOf(LOG, value) ?? Number.NaN;
    expect(at(1e-3) - at(1e-6)).toBeCloseTo(3, 12);
    expect(at(2) - at(1)).toBeCloseTo(at(20e-9) - at(10e-9), 12);
  });

  it("keeps the order of negative values and gives each value back", () => {
    const values = [-10, -1e-3, -2e-6];
    const places = values.map((value) => placeOf(NEGATIVE, value) ?? Number.NaN);
    expect(places.toSorted((a, b) => a - b)).toEqual(places);
    places.forEach((place, i) => {
      expect(valueAt(NEGATIVE, place) / values[i]!).toBeCloseTo(1, 12);
    });
  });

  it("has no place for zero or the other sign on a logarithmic axis", () => {
    expect([0, -1, Number.NaN].map((value) => placeOf(LOG, value))).toEqual([null, null, null]);
    expect(placeOf(NEGATIVE, 1)).toBeNull();
  });

  it("says why an axis can only be linear", () => {
    const reason = (values: (number | null)[]) => {
      const fit = logarithmicFit(values);
      return fit.fits ? fit.sign : reasonFor(fit);
    };
    expect(reason([1, null, 1e-3])).toBe(1);
    expect(reason([-1, -2])).toBe(-1);
    expect(reason([-1, 2])).toBe("the values have both signs");
    expect(reason([0, 2])).toBe("the values reach zero");
    expect(reason([null])).toBe("there are no values");
    expect(reason([3, 3])).toBe("all values are one");
  });
});

describe("ticks", () => {
  it("numbers each decade and engraves 2 to 9 between, a longer one at 5", () => {
    const ticks = decadeTicks(-9, -3, LOG, 12);
    expect(labels(decadeLabels(ticks, "A"))).toEqual([
      "1 nA",
      "10 nA",
      "100 nA",
      "1 µA",
      "10 µA",
      "100 µA",
      "1 mA",
    ]);
    expect(ticks).toHaveLength(6 * 9 + 1);
    expect(ticks.filter(({ rank }) => rank === 1).map(({ value }) => value)).toEqual([
      5e-9, 5e-8, 5e-7, 5e-6, 5e-5, 5e-4,
    ]);
    const two = ticks.find(({ value }) => value === 2e-9);
    expect(two?.place).toBeCloseTo(-9 + Math.log10(2), 12);
  });

  it("numbers every second or third decade where not all fit, and 2 and 5 where few decades are in view", () => {
    expect(labels(decadeLabels(decadeTicks(-12, 0, LOG, 6), "A"))).toEqual([
      "1 pA",
      "100 pA",
      "10 nA",
      "1 µA",
      "100 µA",
      "10 mA",
      "1 A",
    ]);
    expect(labels(decadeLabels(decadeTicks(-6, -5, LOG, 8), "A"))).toEqual(["1 µA", "2 µA", "5 µA", "10 µA"]);
  });

  it("numbers even steps inside a part of a decade", () => {
    const ticks = decadeTicks(Math.log10(1.2), Math.log10(1.6), LOG, 5);
    expect(labels(decadeLabels(ticks, "V"))).toEqual(["1.2 V", "1.3 V", "1.4 V", "1.5 V", "1.6 V"]);
    expect(ticks.find(({ value }) => value === 1.4)?.place).toBeCloseTo(Math.log10(1.4), 12);
  });

  it("mirrors the ruler for negative values", () => {
    const ticks = decadeTicks(-0, 3, NEGATIVE, 9).map(({ value }) => value);
    expect(ticks[0]).toBe(-1);
    expect(ticks.at(-1)).toBe(-1e-3);
  });

  it("takes linear steps of 1, 2 or 5 without the crumbs of addition", () => {
    const values = linearTicks(-0.2, 0.4, 6)
      .filter(({ labelled }) => labelled)
      .map(({ value }) => value);
    expect(values).toEqual([-0.2, -0.1, 0, 0.1, 0.2, 0.3, 0.4]);
    expect(linearTicks(5, 5, 6)).toHaveLength(1);
  });
});

describe("labels", () => {
  it("writes one prefix for a linear axis, with the decimals its step needs", () => {
    const near = linearLabels(linearTicks(0.65001, 0.65003, 5), "V");
    expect(near.unit).toBe("mV");
    expect(labels(near)).toEqual(["650.010", "650.015", "650.020", "650.025", "650.030"]);
    const wide = linearLabels(linearTicks(-200e-3, 200e-3, 4), "V");
    expect(labels(wide)).toEqual(["−200", "−100", "0", "100", "200"]);
  });

  it("leaves units alone that take no prefix", () => {
    const celsius = linearLabels(linearTicks(10, 40, 3), "°C");
    expect([celsius.unit, ...labels(celsius)]).toEqual(["°C", "10", "20", "30", "40"]);
    const pure = linearLabels(linearTicks(-5e-4, 5e-4, 2), "1");
    expect(labels(pure)).toEqual(["−5·10⁻⁴", "0", "5·10⁻⁴"]);
  });
});
