import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { planOf } from "@/lib/analyses/plan";
import { solveRange } from "@/lib/analyses/sweep";
import { numberUnknowns } from "@/lib/circuit/circuit";
import { checkWiring } from "@/lib/circuit/wiring";
import { check } from "@/lib/language/checker";
import { OUTCOMES } from "@/lib/solver/outcome";

const VALUES = { resistor: "1 kΩ", voltage: "1 V", current: "1 mA" } as const;

const net = fc.constantFrom("ground", "a", "b", "c", "d");

/** Circuits of a few resistors and sources wired at random. */
const circuits = fc
  .array(fc.tuple(net, fc.constantFrom("resistor", "resistor", "voltage", "current"), net), {
    minLength: 1,
    maxLength: 9,
  })
  .map((elements) =>
    elements
      .map(([left, kind, right], i) => `${left} -- E${i} : ${kind} ${VALUES[kind]} -- ${right}\n`)
      .join(""),
  );

/** What the solver makes of a text, whether its wiring is sound or not. */
function outcomeOf(text: string): string {
  const design = check(text).design!;
  const circuit = numberUnknowns(design);
  const { outcome } = solveRange({ design, circuit, plan: planOf(design, circuit) }, 0, 1);
  return OUTCOMES[outcome[0]!]!;
}

function errorsOf(text: string): string[] {
  return checkWiring(check(text).design!)
    .filter(({ severity }) => severity === "error")
    .map(({ code }) => code);
}

// A circuit of positive resistors and sources has one solution exactly where no loop is of voltage elements alone and no cut is
// of current elements alone, a net without any path being the emptiest cut: Desoer and Kuh, Basic Circuit Theory (1969), from memory.
describe("the wiring checks agree with what can be solved", { timeout: 60_000 }, () => {
  test("a circuit without an error has a solution", () => {
    let sound = 0;
    fc.assert(
      fc.property(circuits, (text) => {
        if (errorsOf(text).length > 0) return;
        sound += 1;
        expect(outcomeOf(text)).toBe("converged");
      }),
      { numRuns: 3000 },
    );
    expect(sound).toBeGreaterThan(100);
  });

  test("a circuit with a loop, a cut or an island has none", () => {
    let unsound = 0;
    fc.assert(
      fc.property(circuits, (text) => {
        if (!errorsOf(text).some((code) => ["WIR2", "WIR3", "WIR4"].includes(code))) return;
        unsound += 1;
        expect(outcomeOf(text)).not.toBe("converged");
      }),
      { numRuns: 3000 },
    );
    expect(unsound).toBeGreaterThan(100);
  });
});
