import { execFileSync } from "node:child_process";
import { describe, expect, test } from "vitest";

/** Of 20,000 steps: a tenth of a byte each, where one number on the heap would be 16. */
const MOST_BYTES = 2000;

describe("Newton's step, once it is warm, leaves nothing on the heap", () => {
  test.each([
    ["multiplier", "generated"],
    ["multiplier", "listed"],
    ["ladder", "generated"],
  ])("%s, %s", { timeout: 120_000 }, (circuit, way) => {
    const flags = ["--expose-gc", "--max-semi-space-size=64", "--import", "tsx"];
    const words = [...flags, "tests/solver/kernel/print-growth.ts", circuit, way];
    const grown = Number(execFileSync(process.execPath, words, { encoding: "utf8" }));
    expect(grown).toBeLessThan(MOST_BYTES);
  });
});
