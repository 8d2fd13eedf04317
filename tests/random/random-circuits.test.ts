import { describe, expect, test } from "vitest";
import { readAnswers } from "./answers";
import { plantedAt, quantile, scoreOf } from "./measure";
import { SETS, type SetName } from "./sets";

/** The part of a set that every test run solves; `npx tsx tests/random/whole.ts NAME` solves the whole. */
const PART = 150;

describe.each(Object.keys(SETS) as SetName[])("random circuits of the %s set from a cold start", (name) => {
  // Reference: the same equations at 50 digits, written anew in tests/reference/random-circuits.py.
  const set = SETS[name];
  const answers = readAnswers(set);
  const scores = answers.slice(0, PART).map((one, k) => scoreOf(set, k + 1, one));

  test("are as many as the set has", () => {
    expect(answers).toHaveLength(set.howMany);
  });

  test("are all solved and all proved", () => {
    const left = scores.filter(({ outcome, bound }) => outcome.kind !== "converged" || !(bound > 0));
    expect(left.map(({ seed }) => seed)).toEqual([]);
  });

  test("stand within their proved bounds of the 50-digit answers", () => {
    const violations = scores.filter(({ error, bound }) => !(error <= bound));
    expect(violations.map(({ seed, error, bound }) => ({ seed, error, bound }))).toEqual([]);
    expect(
      quantile(
        scores.map(({ bound }) => bound),
        0.5,
      ),
    ).toBeLessThanOrEqual(10e-12);
  });

  test("answers planted 1 nV off are refused, but where rounding alone may be as much", () => {
    const planted = answers.slice(0, PART).map((one, k) => plantedAt(set, k + 1, one, 7 * k));
    expect(planted.filter(({ bound, error }) => !Number.isNaN(bound) && !(error <= bound))).toEqual([]);
    expect(planted.filter(({ bound }) => Number.isNaN(bound)).length).toBeGreaterThan(0.95 * PART);
  }, 60_000);

  test("take 15 steps at the median and 30 at the 95th percentile, at most", () => {
    const iterations = scores.map(({ outcome }) => outcome.iterations);
    expect(quantile(iterations, 0.5)).toBeLessThanOrEqual(15);
    expect(quantile(iterations, 0.95)).toBeLessThanOrEqual(30);
  });
});
