import { readdirSync } from "node:fs";
import { expect, test } from "vitest";
import { exampleNamed, planInWords } from "@/app/docs/examples/examples";
import { GROUPS } from "@/app/docs/examples/groups";
import { sketchOf } from "@/app/docs/examples/sketch";

const NAMES = readdirSync("examples")
  .filter((file) => file.endsWith(".swn"))
  .map((file) => file.slice(0, -4));

test("each file stands in one group, and each name of a group is a file", () => {
  expect(GROUPS.flatMap(({ names }) => names).toSorted()).toEqual(NAMES.toSorted());
});

test.each(NAMES)("%s has a title, a sentence and a curve", async (name) => {
  const example = (await exampleNamed(name))!;
  expect(example.text).toContain(`title "${example.title}"`);
  expect(example.lesson).toMatch(/^[\p{Lu}\d].{30,}\.$/u);
  expect(planInWords(example)).toMatch(/^\d+ elements?, .*\d points/u);
  const { x, y } = sketchOf(example)!;
  expect(x.length).toBe(y.length);
  expect(x.length).toBeLessThanOrEqual(65);
  expect([x[0], x.at(-1)]).toEqual([0, 1]);
  expect(y.some((value) => value !== null)).toBe(true);
});

test("nothing else is read by its name", async () => {
  for (const name of ["../package", "absorbance-head.swn", "", "no-such-thing"]) {
    expect(await exampleNamed(name)).toBeNull();
  }
});
