import { describe, expect, it } from "vitest";
import { decodeColumns } from "@/lib/analyses/columns-document";
import { compile } from "@/lib/analyses/compile";
import { judge } from "@/lib/analyses/judge";
import { overviewOf } from "@/lib/analyses/overview";

/** A sweep of so many points with two traces and whatever else is asked. */
function jobOf(points: number, more = "") {
  const text = `title "Afar"
knob V_in = 1 V
ground -- V1 : voltage V_in -- a
a -- R1 : resistor 1 kΩ -- ground
sweep V_in from 0 V to 1 V, ${points} points
${more}show a.v
show twice = 2 * a.v
`;
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics[0]?.message);
  return job;
}

/** The overview of two columns, as a reader has it. */
function overview(job: ReturnType<typeof jobOf>, traces: readonly Float64Array[]) {
  const bytes = overviewOf(job, { traces });
  return bytes === null ? null : decodeColumns(bytes.buffer);
}

const wave = (points: number) => Float64Array.from({ length: points }, (_, k) => Math.sin(k / 9000));

describe("an overview", () => {
  it("has few points of many, values of the run at places of the run, and its extremes among them", () => {
    const points = 50_000;
    const traces = [wave(points), wave(points).map((value) => 2 * value)];
    // A spike of one point, which a rule of every n-th would pass over.
    traces[1]![31_415] = 7;
    const job = jobOf(points);
    const seen = overview(job, traces)!;
    const values = job.plan.axes[0]!.values;
    expect(seen.axes[0]!.values.length).toBeGreaterThan(1000);
    expect(seen.axes[0]!.values.length).toBeLessThan(5000);
    for (const [k, value] of seen.axes[0]!.values.entries()) {
      const place = values.indexOf(value);
      expect(seen.traces.map((trace) => trace.values[k])).toEqual(traces.map((column) => column[place]));
    }
    for (const [t, column] of traces.entries()) {
      expect(Math.max(...seen.traces[t]!.values)).toBe(column.reduce((a, b) => Math.max(a, b)));
      expect(Math.min(...seen.traces[t]!.values)).toBe(column.reduce((a, b) => Math.min(a, b)));
    }
    expect(seen.axes[0]!.values.at(-1)).toBe(values.at(-1));
    expect(new Set(seen.points.outcome)).toEqual(new Set(["converged"]));
  });

  it("breaks off where the run does, for a single point too", () => {
    const points = 40_000;
    const traces = [wave(points), wave(points)];
    for (const column of traces) column[20_001] = Number.NaN;
    const seen = overview(jobOf(points), traces)!;
    const gaps = [...seen.traces[0]!.values.keys()].filter((k) => Number.isNaN(seen.traces[0]!.values[k]!));
    expect(gaps).toHaveLength(1);
    expect(seen.axes[0]!.values[gaps[0]!]).toBe(jobOf(points).plan.axes[0]!.values[20_001]);
    expect(seen.points.outcome[gaps[0]!]).toBe(null);
  });

  it("has every setting of the outer sweeps, the nominal design alone, and readings per point behind the traces", () => {
    const job = jobOf(
      2000,
      "sweep temperature from 10 °C to 40 °C, 4 points\nread bend = deviation(a.v)\ndraws 2 seed 1\n",
    );
    const { points } = job.plan;
    const column = Float64Array.from({ length: points }, (_, k) => k);
    const seen = overview(job, [column, column])!;
    expect(points).toBe(24_000);
    expect(seen.traces.map(({ name }) => name)).toEqual(["a.v", "twice", "bend"]);
    expect([...seen.traces[0]!.values]).toEqual([...column.subarray(0, 8000)]);
    const { readings } = judge(job, { traces: [column, column] });
    expect([...seen.traces[2]!.values]).toEqual(readings[0]!.values.slice(0, 8000));
  });

  it("is not made of a small run, nor of one too restless for few points", () => {
    expect(overview(jobOf(500), [wave(500), wave(500)])).toBe(null);
    const points = 8000;
    const restless = Array.from({ length: 40 }, (_, t) =>
      Float64Array.from({ length: points }, (_, k) => Math.sin(k * k * (t + 1))),
    );
    const job = jobOf(points);
    const traces = restless.map((_, t) => ({ name: `t${t}`, unit: "V" }));
    expect(overviewOf({ ...job, plan: { ...job.plan, traces } }, { traces: restless })).toBe(null);
  });
});
