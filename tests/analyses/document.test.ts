import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { type RunMatter, toDocument } from "@/lib/analyses/document";
import { solveRange } from "@/lib/analyses/sweep";

const text = readFileSync("examples/reversed-input.swn", "utf8").replace(
  "show out = out.v",
  "show out = out.v, sum.v",
);

function matterOf(source: string): RunMatter {
  const { job, diagnostics } = compile(source);
  const { design, plan } = job!;
  const { traces, outcome, iterations, rung, bound, failures } = solveRange(job!, 0, plan.points);
  return { design, plan, text: source, traces, outcome, iterations, rung, bound, failures, diagnostics };
}

describe("the run document", () => {
  const matter = matterOf(text);
  const document = toDocument(matter);

  test("is what JSON can carry, with the fields of its format", () => {
    expect(JSON.parse(JSON.stringify(document))).toEqual(document);
    expect(Object.keys(document).sort()).toEqual([
      ...["axes", "diagnostics", "draws", "failures", "format", "points", "readings", "requirements"],
      ...["title", "traces", "verdict"],
    ]);
    expect(document).toMatchObject({ format: "sweepwright-run/1", title: "Reversed input (a warning)" });
  });

  test("has one value a point in every column", () => {
    const { points } = matter.plan;
    for (const { values } of document.traces) expect(values).toHaveLength(points);
    for (const column of Object.values(document.points)) expect(column).toHaveLength(points);
    expect(document.traces.map(({ name, unit }) => [name, unit])).toEqual([
      ["out", "V"],
      ["sum.v", "V"],
    ]);
  });

  test("says null where a point failed, and why", () => {
    expect(document.traces[0]!.values[0]).toBeNull();
    expect(document.points.outcome[0]).toBe("came to a stand");
    expect(document.points.rung[0]).toBe("source ramp");
    expect(document.failures[0]).toEqual({
      point: 0,
      outcome: "came to a stand",
      unsettled: ["out", "sum", "Q1"],
    });
    expect(document.traces[0]!.values.at(-1)).toBe(matter.traces[0]!.at(-1));
    expect(document.points.outcome.at(-1)).toBe("converged");
    expect(document.points.bound[0]).toBeNull();
    expect(document.points.bound.at(-1)).toBe(matter.bound.at(-1));
    // Nothing is required, and not all is solved.
    expect(document.verdict).toBe("no data");
  });

  test("says null and no data where nothing is known yet", () => {
    const unknown = new Float64Array(matter.plan.points).fill(Number.NaN);
    const empty = toDocument({
      ...matter,
      traces: matter.traces.map(() => unknown),
      outcome: unknown,
      iterations: unknown,
      rung: unknown,
      bound: unknown,
      failures: [],
    });
    expect(empty.verdict).toBe("no data");
    expect(new Set(empty.points.outcome)).toEqual(new Set([null]));
    expect(new Set(empty.points.rung)).toEqual(new Set([null]));
    expect(new Set(empty.points.bound)).toEqual(new Set([null]));
    expect(new Set(empty.points.iterations)).toEqual(new Set([0]));
    expect(new Set(empty.traces[0]!.values)).toEqual(new Set([null]));
  });

  test("places diagnostics by line and column", () => {
    const source = "ground -- V1 : voltage 1 V -- a\na -- R1 : resistor 1 kΩ -- ground\n";
    const { diagnostics } = toDocument(matterOf(source));
    expect(diagnostics.map(({ code, line, column }) => [code, line, column])).toEqual([["PLN8", 3, 1]]);
  });

  describe("of a netlist with a contract", () => {
    const source = `title "Contract"
knob I = 1 µA
model junction : diode { Is = 1 fA ± 20 % }
ground -- I1 : current I -- a -- D1 : diode junction -- ground
sweep I from 1 nA to 1 µA, 1 per decade
sweep temperature over 0 °C, 25 °C
draws 6 seed 3
show v = a.v
read slope = per_decade(v)
require slope within 59.16 mV ± 0.1 % at temperature = 25 °C as "scale"
require D1.p <= 0.5 µW in 50 % of draws
`;
    const whole = toDocument(matterOf(source));

    test("keeps every draw, and the signals that the contract alone asks for", () => {
      expect(whole.draws).toBe(6);
      expect(whole.traces.map(({ name, values }) => [name, values.length])).toEqual([
        ["v", 4 * 2 * 7],
        ["D1.p", 4 * 2 * 7],
      ]);
      expect(whole.readings.map(({ name, unit, per, values }) => [name, unit, per, values.length])).toEqual([
        ["slope", "V", "sweep", 2 * 7],
      ]);
      expect(JSON.parse(JSON.stringify(whole))).toEqual(whole);
    });

    test("has the verdict of its worst requirement", () => {
      expect(whole.requirements.map(({ label, verdict, unit }) => [label, verdict, unit])).toEqual([
        ["scale", "holds", "V"],
        ["D1.p <= 0.5 µW in 50 % of draws", "broken", "W"],
      ]);
      expect(whole.verdict).toBe("broken");
      expect(whole.requirements[1]!.worst!.at[0]).toEqual({ knob: "I", unit: "A", value: 1e-6 });
    });

    test("holds nothing before the points are in", () => {
      const matter = matterOf(source);
      const unknown = matter.traces.map((column) => column.map(() => Number.NaN));
      const { verdict, requirements } = toDocument({ ...matter, traces: unknown });
      expect(verdict).toBe("no data");
      for (const one of requirements) {
        expect(one).toMatchObject({ verdict: "no data", margin: null, worst: null });
        expect(one.yield).toMatchObject({ holds: 0, of: 6, low: 0 });
      }
    });

    test("has no contract where the text can no longer be read", () => {
      const { readings, requirements, verdict } = toDocument({ ...matterOf(source), design: null });
      expect([readings, requirements, verdict]).toEqual([[], [], "no data"]);
    });
  });
});
