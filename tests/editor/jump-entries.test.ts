import { describe, expect, test } from "vitest";
import { matching, outlineJumps, placeJumps } from "@/app/_components/editor/jump-entries";
import { check } from "@/lib/language/checker";
import { outlineOf } from "@/lib/language/symbols/outline";
import { place, TEXT } from "../language/symbols/netlist";

const entries = outlineJumps(TEXT, outlineOf(check(TEXT).netlist, TEXT));

describe("the outline as a list to jump from", () => {
  test("has its groups in their order, what stands in a block behind it", () => {
    expect([...new Set(entries.map(({ group }) => group))]).toEqual([
      "Knobs and values",
      "Models and blocks",
      "Elements",
      "Plan",
      "Traces and readings",
      "Requirements",
    ]);
    const block = entries.findIndex(({ name }) => name === "log_stage");
    expect(entries.slice(block, block + 5).map(({ name, depth, line }) => [name, depth, line])).toEqual([
      ["log_stage", 0, 10],
      ["R", 1, 11],
      ["Q", 1, 12],
      ["RE", 1, 13],
      ["A", 1, 14],
    ]);
  });

  test("leads to the name and says what follows it", () => {
    const knob = entries.find(({ name }) => name === "R_out")!;
    expect(knob.span).toEqual({ from: place("R_out"), to: place("R_out") + 5 });
    expect(knob.says).toBe("10 kΩ ± 0.1 %");
    for (const { span, name } of entries) expect(TEXT.slice(span.from, span.to)).toBe(name);
  });

  test("is narrowed by letters and by the number of a line", () => {
    expect(matching(entries, "OUT").map(({ name }) => name)).toContain("R_out");
    expect(matching(entries, "13").map(({ name }) => name)).toEqual(["RE"]);
    expect(matching(entries, "nowhere")).toEqual([]);
    expect(matching(entries, " ")).toHaveLength(entries.length);
  });
});

test("the places of a name come with their lines", () => {
  const spans = [place("twice"), place("twice", 1)].map((from) => ({ from, to: from + 5 }));
  expect(placeJumps(TEXT, "twice", spans).map(({ line, says }) => [line, says])).toEqual([
    [5, "let twice = 2 * R_out"],
    [20, "x -- R2 : resistor twice -- ls"],
  ]);
});
