import { describe, expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { solveRange } from "@/lib/analyses/sweep";
import reference from "@/tests/reference/full-devices.json";
import { fullDevices, type Row } from "./full-devices";

// Source of the figures: tests/reference/full-devices.py, the published laws put together anew and solved with 50 digits.

const rows: readonly Row[] = reference;

describe.each([...new Set(rows.map(({ circuit }) => circuit))])("all terms together: %s", (circuit) => {
  const own = rows.filter((row) => row.circuit === circuit);
  const { job, diagnostics } = compile(fullDevices(circuit, own));
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
  const { traces, failures, bound } = solveRange(job, 0, job.plan.points);

  test("every point is solved and proved within 100 pV", () => {
    expect(failures).toEqual([]);
    expect(bound).toHaveLength(own.length);
    for (const one of bound) expect(one).toBeLessThanOrEqual(1e-10);
  });

  test("every net stands within its proved bound of the 50 digits", () => {
    own.forEach((row, point) => {
      job.plan.traces.forEach(({ name }, k) => {
        const wanted = Number(row.values[name.replace(".v", "")]);
        const error = Math.abs(traces[k]![point]! - wanted);
        // Both figures are rounded to the nearest double.
        expect(error, `${name} at ${row.at}, ${row.T} K`).toBeLessThanOrEqual(
          bound[point]! + 2.3e-16 * Math.abs(wanted),
        );
      });
    });
  });
});
