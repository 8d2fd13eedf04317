import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import type { Row } from "@/app/_components/preview/messages";
import { writeKnobs } from "@/app/_components/preview/write-knobs";
import { compile, type Job } from "@/lib/analyses/compile";
import { judge } from "@/lib/analyses/judge";
import type { ShardResult } from "@/lib/analyses/result";
import { solveRange } from "@/lib/analyses/sweep";
import { unitOf } from "@/lib/units/quantity";
import { Bench, previewOf } from "./solve-preview";

const FILES = readdirSync("examples").filter((name) => name.endsWith(".swn"));
/** Settings of outer sweeps that are looked at in one example. */
const MOST_SETTINGS = 6;

const textOf = (name: string) => readFileSync(`examples/${name}`, "utf8");

function jobOf(text: string): Job {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics[0]?.message);
  return job;
}

/** The settings of the outer sweeps in the order of the points, some of them evenly. */
function settingsOf({ plan }: Job): { index: number; turned: Map<string, number> }[] {
  const outer = plan.axes.slice(1);
  const count = outer.reduce((product, { values }) => product * values.length, 1);
  const step = Math.max(1, Math.ceil(count / MOST_SETTINGS));
  return Array.from({ length: Math.ceil(count / step) }, (_, i) => {
    let rest = i * step;
    const turned = new Map(
      outer.map(({ knob, values }) => {
        const place = rest % values.length;
        rest = (rest - place) / values.length;
        return [knob, values[place]!];
      }),
    );
    return { index: i * step, turned };
  });
}

function expectSameBytes(row: Row, solved: ShardResult): void {
  const hex = (columns: readonly Float64Array[]) =>
    columns.map((one) => Buffer.from(one.buffer).toString("hex"));
  const account = ({ outcome, rung, iterations, bound }: Row | ShardResult) => [
    outcome,
    rung,
    iterations,
    bound,
  ];
  expect(hex(account(row))).toEqual(hex(account(solved)));
  expect(hex(row.traces.map(({ values }) => values))).toEqual(hex(solved.traces));
}

describe("the preview of an example is the row of its run, bit for bit", () => {
  test.each(FILES)("%s", async (name) => {
    const text = textOf(name);
    const job = jobOf(text);
    const length = job.plan.axes[0]?.values.length ?? 1;
    for (const { index, turned } of settingsOf(job)) {
      const { answers, rows } = await previewOf(text, turned).then((bench) => ({
        answers: bench.kinds(),
        rows: bench.rows(),
      }));
      expect(answers).toEqual(["outline", "whole", "figures", "done"]);
      const from = index * length;
      expectSameBytes(rows[0]!, solveRange(job, from, from + length));
      expect(rows[0]!.axes.slice(1).map(({ knob, values }) => [knob, values])).toEqual(
        [...turned].map(([knob, value]) => [knob, [value]]),
      );
    }
  });
});

test("without a setting, each outer sweep stands where its knob does, or next to it", async () => {
  const text = textOf("absorbance-head.swn");
  const [row] = (await previewOf(text)).rows();
  expect(row!.axes[1]!.values).toEqual([298.15]);
  expect(row!.temperature).toBe(298.15);
  const near = text.replace("knob I_sample", "knob temperature = 21 °C\nknob I_sample");
  expect((await previewOf(near)).rows()[0]!.axes[1]!.values).toEqual([298.15]);
});

test("readings and requirements of the setting are those of the run without its draws; others are named", async () => {
  const text = `${textOf("absorbance-head.swn").replace("draws 20 seed 5\n", "")}
read cold = highest(at(absorbance, temperature = 10 °C))
require cold <= 5 V as "cold"
require scale >= 0.9 V at temperature = 40 °C as "hot"
`.replace("in 90 % of draws ", "");
  const job = jobOf(text);
  const run = judge(job, solveRange(job, 0, job.plan.points));
  const [row] = (await previewOf(text)).rows();
  expect(row!.elsewhere).toEqual(["cold", "cold", "hot"]);
  expect(row!.requirements.map(({ label }) => label)).toEqual(["scale", "log conformance", "zero"]);
  expect(row!.readings.map(({ name, values }) => [name, values])).toEqual(
    run.readings
      .filter(({ name }) => name !== "cold")
      .map(({ name, per, values }) => {
        const length = per === "sweep" ? 1 : row!.length;
        return [name, values.slice(length, 2 * length)];
      }),
  );
});

describe("a knob that is turned gives what the text with that value gives", () => {
  test.each(FILES)("%s", async (name) => {
    const text = textOf(name);
    const { design, plan } = jobOf(text);
    for (const { name: knob, value, range } of design.knobs) {
      if (plan.axes.some((axis) => axis.knob === knob) || value.op !== "constant") continue;
      const turnedTo =
        knob === "temperature"
          ? 310.15
          : Math.min(range?.high ?? 1e9, Number((1.25 * value.value).toPrecision(6)));
      const change = writeKnobs(text, [{ knob, unit: unitOf(value.dimension), value: turnedTo }])!;
      const other = text.slice(0, change.from) + change.text + text.slice(change.to);
      const [turned] = (await previewOf(text, new Map([[knob, turnedTo]]))).rows();
      const [written] = (await previewOf(other)).rows();
      expect({ ...turned, taken: 0 }).toEqual({ ...written, taken: 0 });
      const [plain] = (await previewOf(text)).rows();
      if (knob === "temperature") expect(turned!.temperature).not.toBe(plain!.temperature);
    }
  });
});

test("an outer sweep can be set to what it does not have", async () => {
  const text = textOf("absorbance-head.swn");
  const [row] = (await previewOf(text, new Map([["temperature", 303.15]]))).rows();
  const [listed] = (await previewOf(text.replace("over 10 °C, 25 °C, 40 °C", "over 30 °C"))).rows();
  expect(row!.axes[1]!.values).toEqual([303.15]);
  expect({ ...row, taken: 0 }).toEqual({ ...listed, taken: 0 });
});

const LONG = `title "Long"
knob I_in = 1 µA
model junction : diode { Is = 2 fA }
ground -- IS : current I_in -- s -- D1 : junction -- ground
sweep I_in from 1 nA to 1 mA, 100 per decade
show v = s.v
read v_mid = at(v, I_in = 1 µA)
`;

test("a row that takes long is shown coarsely first, then whole without proofs, then as the run has it", async () => {
  const bench = new Bench(3);
  bench.ask({ number: 1, text: LONG, place: 300 });
  await bench.goToEnd();
  expect(bench.kinds()).toEqual(["outline", "coarse", "figures", "unproved", "figures", "whole", "done"]);
  const [coarse, unproved, whole] = bench.rows() as [Row, Row, Row];
  expect(coarse.axes[0]!.values.length).toBeLessThan(70);
  expect(coarse.length).toBe(601);
  expect(coarse.readings[0]!.values[0]).toBeCloseTo(whole.readings[0]!.values[0]!, 9);
  expect(unproved.traces).toEqual(whole.traces);
  expect(unproved.bound.every(Number.isNaN)).toBe(true);
  expectSameBytes(whole, solveRange(jobOf(LONG), 0, 601));
});

test("what refines a row is left when something newer is asked; a first look is always finished", async () => {
  const bench = new Bench(3);
  bench.ask({ number: 1, text: LONG });
  await bench.goOn();
  await bench.goOn();
  for (const number of [2, 3, 4]) bench.ask({ number, text: LONG.replace("1 mA", `${number} mA`) });
  await bench.goToEnd();
  expect(
    bench.answers.flatMap((one) => (one.kind === "row" ? [`${one.number} ${one.row.stage}`] : [])),
  ).toEqual(["1 coarse", "4 coarse", "4 unproved", "4 whole"]);
});

test("another place needs no new row: its figures come between two steps, or at once from a row that stands", async () => {
  const bench = new Bench(3);
  bench.ask({ number: 1, text: LONG, place: 0 });
  await bench.goOn();
  await bench.goOn();
  bench.ask({ number: 2, text: LONG, place: 600 });
  await bench.goToEnd();
  expect(bench.rows(1).map(({ stage }) => stage)).toEqual(["coarse", "unproved", "whole"]);
  bench.answers.length = 0;
  bench.ask({ number: 3, text: LONG, place: 300 });
  await bench.goToEnd();
  expect(bench.kinds()).toEqual(["figures", "done"]);
});

test("a text with errors says how many, and an empty one is no fault", async () => {
  const bench = await previewOf("let q = 10k\nshow x = nothing.v\n");
  expect(bench.answers).toEqual([
    { kind: "wrong", number: 1, errors: expect.any(Number) },
    { kind: "done", number: 1 },
  ]);
  expect((await previewOf("")).kinds().at(-1)).toBe("done");
});

test("a row of very many points is shown coarsely, with why it is not shown whole", async () => {
  const bench = await previewOf(LONG.replace("100 per decade", "3000 per decade"));
  expect(bench.kinds()).toEqual(["outline", "coarse", "figures", "too large", "done"]);
  expect(bench.rows()[0]!.axes[0]!.values.length).toBeLessThan(200);
  expect(bench.answers.find(({ kind }) => kind === "too large")).toMatchObject({ why: { points: 18_001 } });
});
