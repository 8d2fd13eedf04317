import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { Draws } from "@/lib/analyses/draws";
import { judge } from "@/lib/analyses/judge";
import { type PointRange, shardsOf } from "@/lib/analyses/strands";
import { solveRange } from "@/lib/analyses/sweep";
import type { Tolerance } from "@/lib/language/ast";

function jobOf(text: string) {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join("\n"));
  return job;
}

/** Every trace of a text, by name; the nominal draw first. */
function tracesOf(text: string): Record<string, Float64Array> {
  const job = jobOf(text);
  const { traces } = solveRange(job, 0, job.plan.points);
  return Object.fromEntries(job.plan.traces.map(({ name }, i) => [name, traces[i]!]));
}

const TWO =
  "ground -- I1 : current 1 mA -- a -- R1 : resistor R -- ground\nground -- I2 : current 1 mA -- b -- R2 : resistor R -- ground\n";
const SHOW = "show a = a.v / 1 V, b = b.v / 1 V\n";

function correlation(x: Float64Array, y: Float64Array): number {
  const mean = (v: Float64Array) => v.reduce((sum, value) => sum + value, 0) / v.length;
  const [mx, my] = [mean(x), mean(y)];
  const sum = (f: (i: number) => number) => x.reduce((total, _, i) => total + f(i), 0);
  const xy = sum((i) => (x[i]! - mx) * (y[i]! - my));
  return xy / Math.sqrt(sum((i) => (x[i]! - mx) ** 2) * sum((i) => (y[i]! - my) ** 2));
}

describe("draws", () => {
  test("of one let are drawn anew for each part, draw 0 is nominal", () => {
    const { a, b } = tracesOf(`let R = 1 kΩ ± 10 %\ndraws 2000 seed 1\n${TWO}${SHOW}`);
    expect([a![0], b![0]]).toEqual([1, 1]);
    expect([...a!.slice(1)].every((value) => value > 0.9 && value < 1.1 && value !== 1)).toBe(true);
    expect(Math.abs(correlation(a!.slice(1), b!.slice(1)))).toBeLessThan(4.5 / Math.sqrt(2000));
  });

  test("that track share a common draw and differ by the smaller one", () => {
    const { a, b } = tracesOf(
      `let R = 1 kΩ ± 10 % track array within 0.1 %\ndraws 2000 seed 1\n${TWO}${SHOW}`,
    );
    const apart = a!.map((value, i) => Math.abs(value - b![i]!));
    expect(Math.max(...apart)).toBeLessThanOrEqual(0.002);
    expect(Math.max(...apart)).toBeGreaterThan(0.0015);
    expect(Math.max(...a!)).toBeGreaterThan(1.08);
  });

  test("within one part agree wherever the part uses the value", () => {
    const { d } = tracesOf(
      "let R = 1 kΩ ± 10 %\ndraws 50 seed 1\nground -- I1 : current 1 mA -- a -- R1 : resistor R - R / 2 + R / 2 - R * 0.5 -- ground\nground -- I2 : current 1 mA -- b -- R2 : resistor R / R * 1 kΩ -- ground\nshow d = b.v / 1 V",
    );
    expect([...d!].every((value) => value === 1)).toBe(true);
  });

  test("of a model's parameter are drawn for each element that follows it", () => {
    const { a, b } = tracesOf(
      "model m : diode { Is = 1 fA ± 50 % }\ndraws 500 seed 3\nground -- I1 : current 1 mA -- a -- D1 : m -- ground\nground -- I2 : current 1 mA -- b -- D2 : m -- ground\nshow a = a.v / 1 V, b = b.v / 1 V",
    );
    expect(Math.abs(correlation(a!.slice(1), b!.slice(1)))).toBeLessThan(4.5 / Math.sqrt(500));
    expect(new Set(a!).size).toBe(501);
  });

  test("leave names outside parts nominal", () => {
    const text = `let R = 1 kΩ ± 10 %\ndraws 20 seed 1\n${TWO}show ohms = R\nrequire a.v within 1 mA * R ± 0.001 %`;
    const job = jobOf(text);
    const columns = solveRange(job, 0, job.plan.points);
    expect([...columns.traces[0]!].every((value) => value === 1000)).toBe(true);
    expect(judge(job, columns).verdict).toBe("broken");
  });

  test("of a part stay when another part is added, a value edited or the count raised", () => {
    const first = tracesOf(`let R = 1 kΩ ± 10 %\ndraws 20 seed 1\n${TWO}${SHOW}`);
    const more = `a -- R0 : resistor 1 MΩ ± 1 % -- b\n`;
    const second = tracesOf(`let R = 2 kΩ ± 10 %\ndraws 40 seed 1\n${TWO}${SHOW}`);
    expect(second.a!.slice(0, 21).map((value) => value / 2)).toEqual(first.a);
    const third = tracesOf(`let R = 1 kΩ ± 10 %\ndraws 20 seed 1\n${more}${TWO}show b = R2.v / R2.i / 1 kΩ`);
    third.b!.forEach((value, i) => {
      expect(value).toBeCloseTo(first.b![i]!, 12);
    });
  });

  test("of another seed or title are others", () => {
    const text = (seed: number, title: string) =>
      `title "${title}"\nlet R = 1 kΩ ± 10 %\ndraws 3 seed ${seed}\n${TWO}${SHOW}`;
    const all = [text(1, "a"), text(2, "a"), text(1, "b"), text(2 ** 32 + 1, "a")].map(
      (one) => tracesOf(one).a![1],
    );
    expect(new Set(all).size).toBe(4);
  });
});

describe("laws of tolerances", () => {
  const base = { amount: 0.03, relative: true, sigmas: 1, track: null } as const;
  const draws = new Draws({ title: "laws", draws: { count: 1, seed: 5 } });
  const shifts = (tolerance: Tolerance, nominal: number) =>
    Float64Array.from({ length: 20_000 }, (_, k) => draws.at(k + 1)!.shift("R1", "R", tolerance, nominal));

  test("uniform: within the half-width, with the variance of a uniform law", () => {
    const found = shifts({ ...base, law: "uniform" }, 2);
    expect(Math.max(...found.map(Math.abs))).toBeLessThanOrEqual(0.06);
    const variance = found.reduce((sum, x) => sum + x * x, 0) / found.length;
    expect(Math.abs(variance / (0.06 ** 2 / 3) - 1)).toBeLessThan(4.5 * Math.sqrt(0.8 / found.length));
  });

  test("normal 3 sigma: a third of the half-width is the standard deviation", () => {
    const found = shifts({ ...base, law: "normal", sigmas: 3, relative: false }, 2);
    const variance = found.reduce((sum, x) => sum + x * x, 0) / found.length;
    expect(Math.abs(variance / 0.01 ** 2 - 1)).toBeLessThan(4.5 * Math.sqrt(2 / found.length));
    // Φ(−2) twice, of tables of the normal law.
    const beyond = found.filter((x) => Math.abs(x) > 0.02).length / found.length;
    expect(Math.abs(beyond - 0.0455)).toBeLessThan(4.5 * Math.sqrt((0.0455 * 0.9545) / found.length));
  });
});

describe("a run with draws", () => {
  const job = jobOf(
    `title "Shards"\nknob I = 1 µA\nmodel m : diode { Is = 1 fA ± 20 %, Rs = 2 Ω ± 10 %, n = 1.05 }\nground -- I1 : current I ± 0.5 % -- a -- D1 : m -- ground\nsweep I from 1 nA to 10 mA, 5 per decade\nsweep temperature over 0 °C, 25 °C, 70 °C\ndraws 24 seed 9\nshow v = a.v\nread slope = per_decade(v) for I in 10 nA .. 10 µA\nrequire slope within 62.1 mV ± 0.5 % at temperature = 25 °C\nrequire v rising`,
  );
  const { points } = job.plan;

  test("has points of every draw, the draws outermost", () => {
    expect([job.plan.draws, points]).toEqual([24, 36 * 3 * 25]);
  });

  function document(ranges: readonly PointRange[]): string {
    const traces = job.plan.traces.map(() => new Float64Array(points).fill(Number.NaN));
    const bound = new Float64Array(points);
    for (const { from, to } of ranges) {
      const result = solveRange(job, from, to);
      traces.forEach((column, i) => {
        column.set(result.traces[i]!, from);
      });
      bound.set(result.bound, from);
    }
    return JSON.stringify([traces.map((column) => [...column]), [...bound], judge(job, { traces })]);
  }

  test("is the same to the last byte for 1, 2, 7 and 64 shards in any order", () => {
    const cut = (n: number) =>
      Array.from({ length: n }, (_, i) => ({
        from: Math.floor((i * points) / n),
        to: Math.floor(((i + 1) * points) / n),
      }));
    const whole = document(cut(1));
    expect(document(shardsOf(job.plan))).toBe(whole);
    for (const n of [2, 7, 64]) {
      const ranges = cut(n);
      const mixed = ranges.map((_, i) => ranges[(i * 5 + 3) % n]!);
      expect(new Set(mixed).size).toBe(n);
      expect(document(mixed)).toBe(whole);
    }
  });
});
