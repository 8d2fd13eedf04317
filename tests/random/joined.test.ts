import { expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { System } from "@/lib/circuit/system";
import { Ladder } from "@/lib/solver/ladder";
import { textOf } from "./circuit";
import { joined } from "./joined";
import { SETS, type SetName } from "./sets";

// A circuit is only as easy as the hardest of its parts: one that goes to and fro must not hold up the others, nor lose what they have reached.
test.each([
  ["plain", 1, 20],
  ["full", 20, 12],
  ["full", 401, 10],
] as const)(
  "circuits of the %s set, from %i on, %i of them in one, are solved and proved",
  { timeout: 60_000 },
  (name, from, count) => {
    const set = SETS[name satisfies SetName];
    const circuits = Array.from({ length: count }, (_, k) => set.circuitOf(from + k));
    const { job, diagnostics } = compile(textOf(joined(circuits)), {
      size: { text: 1e6, elements: 1e4, unfolded: 1e5 },
    });
    if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
    expect(job.circuit.size).toBeGreaterThan(350);
    const outcome = new Ladder(new System(job.design, job.circuit)).solve(false);
    expect(outcome.kind).toBe("converged");
    if (outcome.kind === "converged") expect(outcome.bound).toBeLessThan(1e-6);
  },
);
