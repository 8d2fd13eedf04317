import { expect, test } from "vitest";
import { type SpreadMatter, spreadOf, subjectsOf } from "@/app/(work)/[workspace]/runs/[id]/spread/subjects";
import { compile } from "@/lib/analyses/compile";
import { judge } from "@/lib/analyses/judge";

const TEXT = `title "Two settings and two draws (invented)"
knob k = 1 V
ground -- V1 : voltage k -- in -- R1 : resistor 1 kΩ ± 1 % -- ground
sweep k over 1 V, 2 V
sweep temperature over 0 °C, 25 °C
draws 2 seed 1
show y = in.v
read top = highest(y)
require y <= 9 V as "low"
require top between 0 V and 5.5 V at temperature = 25 °C as "warm"
require top <= 7 V as "at all"
`;

/** Values of y, the knob fastest, then temperature, then draws: tops 2 and 4, then 3 and 5, then 6 and 8. */
const Y = [1, 2, 3, 4, 1, 3, 5, 4, 6, 1, 8, 2];

function matter(): SpreadMatter {
  const { job, diagnostics } = compile(TEXT);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join("\n"));
  const { readings, requirements } = judge(job, { traces: [Float64Array.from(Y)] });
  return { axes: job.plan.axes, readings, requirements, budgets: [], causes: [] };
}

test("broken requirements come first, then the others, then readings with their settings", () => {
  const found = subjectsOf(matter());
  expect(found.map(({ key, name }) => [key, name])).toEqual([
    ["require:1", "warm"],
    ["require:2", "at all"],
    ["require:0", "low"],
    ["read:top", "top"],
  ]);
  expect(found[3]!.settings.map((words) => words.replaceAll("\u202f", " "))).toEqual(["0 °C", "25 °C"]);
});

test("a reading is spread at one setting, within all limits that requirements give it there", () => {
  const whole = matter();
  const [, , , top] = subjectsOf(whole);
  expect(spreadOf(whole, top!, 0)).toEqual({
    nominal: 2,
    drawn: [3, 6],
    limits: { low: null, high: 7 },
    budget: null,
  });
  expect(spreadOf(whole, top!, 1)).toEqual({
    nominal: 4,
    drawn: [5, 8],
    limits: { low: 0, high: 5.5 },
    budget: null,
  });
});

test("a requirement is spread by the worst of each draw", () => {
  const whole = matter();
  const [warm, , low] = subjectsOf(whole);
  expect(spreadOf(whole, warm!, 0)).toMatchObject({
    nominal: 4,
    drawn: [5, 8],
    limits: { low: 0, high: 5.5 },
  });
  expect(spreadOf(whole, low!, 0)).toMatchObject({
    nominal: 4,
    drawn: [5, 8],
    limits: { low: null, high: 9 },
  });
});

test("what nothing spreads is no subject", () => {
  const whole = matter();
  const single = whole.requirements.map((one) => ({ ...one, drawn: one.drawn.slice(0, 1) }));
  const readings = whole.readings.map((one) => ({ ...one, values: one.values.slice(0, 2) }));
  expect(subjectsOf({ ...whole, requirements: single, readings })).toEqual([]);
});
