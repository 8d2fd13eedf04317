import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { branchesDocument } from "@/lib/analyses/branches-document";
import { compile } from "@/lib/analyses/compile";
import { toDocument } from "@/lib/analyses/document";
import type { RunDocument } from "@/lib/analyses/result";
import { solveRange } from "@/lib/analyses/sweep";
import { format } from "@/lib/language/format";

const FILES = readdirSync("examples").filter((name) => name.endsWith(".swn"));
/** Those whose comments do not say that everything holds. */
const BROKEN_ON_PURPOSE = "uncompensated-head.swn";
/** Keeps no requirement: it shows points that have no solution. */
const WARNING = "reversed-input.swn";
/** Points that the demo solves of one example at most. */
const MOST_POINTS = 2_500;

const textOf = (name: string) => readFileSync(`examples/${name}`, "utf8");

const documents = new Map<string, RunDocument>();

function documentOf(name: string): RunDocument {
  const known = documents.get(name);
  if (known !== undefined) return known;
  const text = textOf(name);
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(`${name}: ${diagnostics[0]?.message}`);
  const { plan, design } = job;
  const {
    from: _from,
    to: _to,
    unknowns: _unknowns,
    residual: _residual,
    ...columns
  } = solveRange(job, 0, plan.points);
  const document = toDocument({
    plan,
    design,
    text,
    ...columns,
    branches: branchesDocument(job),
    diagnostics,
  });
  documents.set(name, document);
  return document;
}

test("there are at least fifteen", () => {
  expect(FILES.length).toBeGreaterThanOrEqual(15);
});

describe.each(FILES)("%s", (name) => {
  test("is canonical, invented, and says what is learnt or why it is kept", () => {
    const text = textOf(name);
    expect(format(text)).toBe(text);
    expect(text).toMatch(/^# Northbench Instruments \(invented\)/u);
    expect(text).toMatch(/# What one learns here: |kept as a warning|broken on purpose/u);
  });

  test("has no problem and is light enough for the demo", () => {
    const { job, diagnostics } = compile(textOf(name));
    expect(diagnostics).toEqual([]);
    expect(job!.plan.points).toBeLessThanOrEqual(MOST_POINTS);
  });

  test("comes to the verdict of its comment", () => {
    const { verdict, requirements, failures } = documentOf(name);
    const expected = name === BROKEN_ON_PURPOSE ? "broken" : name === WARNING ? "no data" : "holds";
    const wrong = requirements.filter((one) => one.verdict !== "holds").map(({ label }) => label);
    expect({ verdict, wrong }).toEqual({
      verdict: expected,
      wrong: name === BROKEN_ON_PURPOSE ? ["scale at every temperature"] : [],
    });
    if (name === WARNING) expect(failures.length).toBeGreaterThan(0);
    else {
      expect(requirements.length).toBeGreaterThan(0);
      expect(failures).toEqual([]);
    }
  });

  test("is proved at every point that is solved, within 10 pV at the median", () => {
    const { outcome, bound } = documentOf(name).points;
    const solved = outcome.flatMap((kind, k) => (kind === "converged" ? [bound[k] ?? Number.NaN] : []));
    expect(solved.length).toBeGreaterThan(0);
    expect(solved.every((radius) => radius > 0)).toBe(true);
    expect(solved.sort((a, b) => a - b)[solved.length >> 1]).toBeLessThanOrEqual(10e-12);
  });
});

test("along their sweeps they take at most 2.6 steps a point, at the mean", () => {
  const along = FILES.flatMap((name) => {
    const { rung, iterations } = documentOf(name).points;
    return iterations.filter((_, k) => rung[k] === "warm start");
  });
  expect(along.length).toBeGreaterThan(8_000);
  expect(along.reduce((sum, one) => sum + one, 0) / along.length).toBeLessThanOrEqual(2.6);
});

/** A reading of an example: its lowest and highest value. */
function readingOf(name: string, reading: string): { low: number; high: number } {
  const values = documentOf(name).readings.find((one) => one.name === reading)!.values;
  const known = values.filter((value) => value !== null);
  expect(known).toHaveLength(values.length);
  return { low: Math.min(...known), high: Math.max(...known) };
}

/** Thermal voltage times ln 10 by the exact constants of the SI, V. */
const decadeAt = (celsius: number) => ((1.380649e-23 * (celsius + 273.15)) / 1.602176634e-19) * Math.LN10;

describe("what the comments say", () => {
  test("the head without compensation breaks by about 40 mV a decade", () => {
    const scale = documentOf(BROKEN_ON_PURPOSE).requirements.find(({ verdict }) => verdict === "broken")!;
    expect(scale.margin).toBeGreaterThan(-0.045);
    expect(scale.margin).toBeLessThan(-0.035);
    // 1 V a decade at 25 °C follows absolute temperature: 15 K of 298.15 K are 50 mV, of which 10 mV are allowed.
    expect(scale.margin).toBeCloseTo(0.01 - 15 / 298.15, 2);
  });

  test("the exponential of the gain cell is a decade for V_T · ln 10", () => {
    const { low, high } = readingOf("gain-cell.swn", "slope");
    expect(1 / high).toBeCloseTo(decadeAt(10), 4);
    expect(1 / low).toBeCloseTo(decadeAt(40), 4);
  });

  test("the optical power meter gives 59.16 mV a decade over at least eight and a half decades", () => {
    const { low, high } = readingOf("optical-power-meter.swn", "slope");
    for (const slope of [low, high]) expect(Math.abs(slope + decadeAt(25))).toBeLessThan(5e-5);
    expect(readingOf("optical-power-meter.swn", "decades").low).toBeGreaterThanOrEqual(8.5);
  });

  test("the level detector trips within what half a millivolt is of V_T", () => {
    const { low, high } = readingOf("level-detector.swn", "trip");
    const most = Math.exp(0.5e-3 / (decadeAt(25) / Math.LN10)) - 1;
    // Read between points that are half a percent apart, where the output goes from one limit to the other.
    expect(high - 1).toBeLessThan(most + 0.005);
    expect(1 - low).toBeLessThan(most + 0.005);
    expect(high - low).toBeGreaterThan(most);
  });

  test("each stage of the chain adds its limit for every factor of its gain", () => {
    const { low, high } = readingOf("limiting-chain.swn", "slope");
    expect(low).toBe(high);
    expect(Math.abs(low / (0.1 / Math.log10(4)) - 1)).toBeLessThan(0.03);
  });

  test("a quarter of the light costs the solar cell n · V_T · ln 4 of its open voltage", () => {
    const { low, high } = readingOf("solar-cell.swn", "open");
    const fall = 1.4 * (decadeAt(25) / Math.LN10) * Math.log(4);
    // The shunt takes 11 mA, which is more of the small current than of the large one.
    expect(Math.abs((high - low) / fall - 1)).toBeLessThan(0.04);
  });
});
