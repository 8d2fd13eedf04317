import { describe, expect, test } from "vitest";
import { betaQuantile, incompleteBeta, yieldOf } from "@/lib/analyses/yield";

/** holds, of, low, high: scipy.stats.beta.ppf of SciPy 1.17.1 (0.025 of k, n − k + 1 and 0.975 of k + 1, n − k). */
const INTERVALS: readonly (readonly [number, number, number, number])[] = [
  [0, 1, 0, 0.975],
  [1, 1, 0.025, 1],
  [0, 20, 0, 0.1684334709830853],
  [20, 20, 0.8315665290169146, 1],
  [1, 20, 0.0012650894979498038, 0.24873276277202777],
  [10, 20, 0.27195784956079183, 0.7280421504392081],
  [95, 100, 0.8871650888945373, 0.9835681208179479],
  [380, 400, 0.9238330272448575, 0.969194758856734],
  [399, 400, 0.9861502300379867, 0.9999367074830952],
  [400, 400, 0.9908201954163347, 1],
  [0, 400, 0, 0.00917980458366526],
  [7500, 10000, 0.7413910539029068, 0.7584631238179703],
  [123, 200000, 0.0005111504009872895, 0.0007337385141882619],
  [199990, 200000, 0.9999080501485555, 0.99997602280448],
];

/** x, a, b, I_x(a, b): scipy.special.betainc of SciPy 1.17.1. */
const BETAS: readonly (readonly [number, number, number, number])[] = [
  [0.5, 2, 3, 0.6875],
  [0.1, 0.5, 0.5, 0.20483276469913345],
  [0.9, 20, 1, 0.12157665459056931],
  [0.01, 1, 400, 0.9820494467249548],
  [0.95, 380, 21, 0.5591120624659831],
  [0.3, 100, 250, 0.7265414741433196],
  [1e-6, 1, 1e5, 0.09516262720594036],
  [0.75, 7500, 2501, 0.5053740797519635],
];

describe("the interval of Clopper and Pearson", () => {
  test.each(INTERVALS)("of %i in %i is as SciPy has it", (holds, of, low, high) => {
    const found = yieldOf(holds, of);
    expect(found).toMatchObject({ holds, of });
    expect(Math.abs(found.low - low)).toBeLessThanOrEqual(1e-11);
    expect(Math.abs(found.high - high)).toBeLessThanOrEqual(1e-11);
  });
});

describe("the incomplete beta function", () => {
  test.each(BETAS)("at %d of %d and %d is as SciPy has it", (x, a, b, value) => {
    expect(Math.abs(incompleteBeta(x, a, b) / value - 1)).toBeLessThan(1e-9);
  });

  test("is inverted by its quantile", () => {
    for (const p of [1e-9, 0.025, 0.5, 0.975])
      expect(Math.abs(incompleteBeta(betaQuantile(p, 12, 34), 12, 34) / p - 1)).toBeLessThan(1e-11);
  });

  test("is 0 and 1 at its ends", () => {
    expect([incompleteBeta(0, 2, 3), incompleteBeta(1, 2, 3)]).toEqual([0, 1]);
  });
});
