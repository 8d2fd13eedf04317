import { readFileSync } from "node:fs";
import { describe, expect, test, vi } from "vitest";
import { type Branch, branchesOf } from "@/lib/analyses/branches";
import { branchesDocument } from "@/lib/analyses/branches-document";
import { compile } from "@/lib/analyses/compile";
import { SEVERAL, textOf } from "../outside/several-solutions";

vi.setConfig({ testTimeout: 60_000 });

const record = (id: string) => SEVERAL.find((one) => one.id === id)!;

function jobOf(text: string) {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
  return job;
}

/** `s` where a branch is stable, `u` where not, `.` where it does not reach. */
const drawn = ({ points }: Branch) =>
  points.map((point) => (point === null ? "." : point.isStable ? "s" : "u")).join("");

describe.each([
  ["MS4", (text: string) => text.replace("81 points", "41 points"), "VIN"],
  ["MS2", (text: string) => text.replace("show", "sweep E from 0 V to 1.2 V, 41 points\nshow"), "E"],
] as const)("the branches of %s", (id, change, knob) => {
  const job = jobOf(`seek 4\n${change(textOf(record(id)))}`);
  const { branches, folds, isComplete } = branchesOf(job);
  const turns = record(id)
    .turning_points!.map((turn) => Number(turn[knob]))
    .toSorted((a, b) => a - b);
  const [lower, upper] = turns as [number, number];

  test("turn back where the record says", () => {
    const found = folds.map(({ value }) => value).sort((a, b) => a - b);
    expect(found).toHaveLength(2);
    for (const [k, value] of found.entries()) expect(Math.abs(value - turns[k]!)).toBeLessThan(1e-12);
  });

  test("are three: up to the one fold, from the other on, and between them one that is not stable", () => {
    const { values } = job.plan.axes[0]!;
    const draw = (of: (value: number) => string) => values.map(of).join("");
    expect(isComplete).toBe(true);
    expect(branches.map(drawn).sort()).toEqual(
      [
        draw((value) => (value <= upper ? "s" : ".")),
        draw((value) => (value >= lower ? "s" : ".")),
        draw((value) => (value >= lower && value <= upper ? "u" : ".")),
      ].sort(),
    );
  });

  test("are proved at every point, and show their traces", () => {
    for (const { points } of branches) {
      for (const point of points) {
        if (point === null) continue;
        expect(point.bound).toBeLessThan(1e-10);
        expect(point.traces).toEqual([point.x[job.circuit.nets.get(id === "MS4" ? "c1" : "v")!]]);
      }
    }
  });
});

describe("the alarm of the indices along an axis", () => {
  const bandgap = readFileSync("examples/bandgap-start-up.swn", "utf8");

  test("rings where a branch is missing: the reference has three that do not meet, and two are asked for", () => {
    const text = bandgap.replace("seek 3", "seek 2");
    expect(text).not.toBe(bandgap);
    // The second row is that without a start-up resistor.
    const { branches, folds, isComplete } = branchesOf(jobOf(text), 13);
    expect([branches.length, folds.length, isComplete]).toEqual([2, 0, false]);
  });

  test("rings where a branch goes on as an unstable one, and the two beside it are not asked for", () => {
    // A flip-flop that is one only while its supply is above half a volt; one point a setting is asked for.
    const text = textOf(record("MS3")).replace(/voltage 5 V/, "voltage supply");
    const swept = (range: string) =>
      jobOf(
        `seek 1\nknob supply = 5 V\n${text.replace("show", `sweep supply from ${range}, 11 points\nshow`)}`,
      );
    expect(branchesOf(swept("0 V to 0.5 V")).isComplete).toBe(true);
    const { branches, isComplete } = branchesOf(swept("0 V to 5 V"));
    expect(branches.map(drawn)).toEqual(["ssuuuuuuuuu"]);
    expect(isComplete).toBe(false);
  });
});

describe("the branches of a run document", () => {
  test("have one value a setting in every column, null where a branch does not reach, for every row", () => {
    const text = textOf(record("MS4")).replace("81 points", "21 points");
    const job = jobOf(`seek 4\n${text.replace("show", "sweep temperature over 290 K, 310 K\nshow")}`);
    const rows = branchesDocument(job)!;
    expect(JSON.parse(JSON.stringify(rows))).toEqual(rows);
    expect(rows.map(({ at }) => at)).toEqual([290, 310].map((value) => [{ knob: "temperature", value }]));
    for (const { branches, folds, complete } of rows) {
      expect(complete).toBe(true);
      expect(branches).toHaveLength(3);
      expect(folds).toHaveLength(2);
      for (const { stable, bound, traces } of branches) {
        expect([stable.length, bound.length, traces[0]!.values.length]).toEqual([21, 21, 21]);
        for (const [k, value] of stable.entries()) {
          expect([bound[k] === null, traces[0]!.values[k] === null]).toEqual([
            value === null,
            value === null,
          ]);
        }
      }
    }
    // The transconductance I/V_T falls where it is warmer, and with it the loop gain: the thresholds draw together.
    const folds = rows.map((row) => row.folds.map(({ value }) => value).sort());
    expect(folds[1]![0]!).toBeGreaterThan(folds[0]![0]!);
    expect(folds[1]![1]!).toBeLessThan(folds[0]![1]!);
  });

  test("are not there where a text does not seek", () => {
    expect(branchesDocument(jobOf(textOf(record("MS5"))))).toBeNull();
  });
});

describe("branches without an axis", () => {
  test("are the operating points themselves", () => {
    const { branches, folds, isComplete } = branchesOf(jobOf(`seek 4\n${textOf(record("MS5"))}`));
    expect(branches.map(drawn)).toEqual(["s", "u", "s"]);
    expect(folds).toEqual([]);
    expect(isComplete).toBe(true);
  });

  test("say where fewer are asked for than there are", () => {
    const { branches, isComplete } = branchesOf(jobOf(`seek 1\n${textOf(record("MS3"))}`));
    expect(branches).toHaveLength(1);
    expect(isComplete).toBe(branches[0]!.points[0]!.index === 1);
  });
});
