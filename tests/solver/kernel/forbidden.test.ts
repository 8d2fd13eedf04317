import { execFileSync } from "node:child_process";
import { describe, expect, test } from "vitest";

/** What print-bytes prints in a process of its own. */
function printed(netlist: string, ...flags: string[]): string[] {
  const words = [...flags, "--import", "tsx", "tests/solver/kernel/print-bytes.ts", netlist];
  return execFileSync(process.execPath, words, { encoding: "utf8" }).trim().split(" ");
}

describe("where code may not be generated", () => {
  test("a sweep gives the same bytes", { timeout: 120_000 }, () => {
    const netlist = "examples/one-quadrant-multiplier.swn";
    const [may, steps, bytes] = printed(netlist);
    const [mayNot, listedSteps, listed] = printed(netlist, "--jitless");
    expect([may, mayNot]).toEqual(["true", "false"]);
    // Code is generated after 2,000 steps.
    expect(Number(steps)).toBeGreaterThan(3000);
    expect(listedSteps).toBe(steps);
    expect(listed).toBe(bytes);
  });
});
