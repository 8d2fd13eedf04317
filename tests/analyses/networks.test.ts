import { expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { solveRange } from "@/lib/analyses/sweep";
import { network, stream, textOfNetwork as textOf } from "../random/networks";

const V_T = (1.380649e-23 * 298.15) / 1.602176634e-19;

/** Currents into collector and base, as the books write the transport form with Early effect, in plain exponentials. */
function booked(kind: "npn" | "pnp", vbe: number, vbc: number): [number, number] {
  const sign = kind === "npn" ? 1 : -1;
  const [ef, er] = [Math.exp((sign * vbe) / V_T), Math.exp((sign * vbc) / V_T)];
  const ic = 1e-15 * (ef - er) * (1 - (sign * vbc) / 60) - (1e-15 / 2) * (er - 1);
  return [sign * ic, sign * ((1e-15 / 100) * (ef - 1) + (1e-15 / 2) * (er - 1))];
}

test("random transistor networks are solved, and their currents balance by the laws of the books", () => {
  const next = stream(20);
  let solved = 0;
  for (let trial = 0; trial < 120; trial++) {
    const made = network(next);
    const { job } = compile(textOf(made));
    // The wiring check refuses a network in which a collector hangs on nothing.
    if (job === null) continue;
    const result = solveRange(job, 0, 1);
    expect(result.failures, textOf(made)).toEqual([]);
    solved += 1;
    const voltages = new Map(
      job.plan.unknowns.map(({ name }, j) => [name.slice(0, -2), result.unknowns[j]![0]!]),
    );
    voltages.set("ground", 0);
    const at = (net: string) => voltages.get(net)!;
    const sums = new Map<string, { sum: number; size: number }>();
    const leave = (net: string, amperes: number) => {
      const { sum, size } = sums.get(net) ?? { sum: 0, size: 0 };
      sums.set(net, { sum: sum + amperes, size: size + Math.abs(amperes) });
    };
    for (const { from, to, ohms } of made.resistors) {
      const amperes = (at(from) - at(to)) / ohms;
      leave(from, amperes);
      leave(to, -amperes);
    }
    for (const { kind, c, b, e } of made.transistors) {
      const [ic, ib] = booked(kind, at(b) - at(e), at(b) - at(c));
      leave(c, ic);
      leave(b, ib);
      leave(e, -ic - ib);
    }
    for (const [net, { sum, size }] of sums) {
      if (net === "ground" || net === "vcc") continue;
      // A voltage of 10 V is rounded at 2e-15 V, which 10 Ω make 2e-16 A and 1/V_T four billionths of a millionth of a current.
      expect(Math.abs(sum), `${net} of\n${textOf(made)}`).toBeLessThanOrEqual(1e-10 * size + 1e-15);
    }
  }
  expect(solved).toBeGreaterThan(80);
}, 60_000);
