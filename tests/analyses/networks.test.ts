import { expect, test } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { solveRange } from "@/lib/analyses/sweep";

/** A repeatable stream of numbers in [0, 1) (Lehmer's generator of 1951 with the multiplier 48271). */
function stream(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
}

type Branch = { readonly from: string; readonly to: string; readonly ohms: number };
type Transistor = {
  readonly kind: "npn" | "pnp";
  readonly c: string;
  readonly b: string;
  readonly e: string;
};

/** A random network on 10 V: resistors everywhere, one in series with every base and emitter, so that a solution exists. */
function network(next: () => number) {
  const inner = Array.from({ length: 3 + Math.floor(6 * next()) }, (_, i) => `n${i}`);
  const all = [...inner, "ground", "vcc"];
  const pick = () => all[Math.floor(all.length * next())]!;
  const other = (than: string) => {
    let one = pick();
    while (one === than) one = pick();
    return one;
  };
  const ohms = (low: number, decades: number) => Number((10 ** (low + decades * next())).toPrecision(3));
  const resistors: Branch[] = inner.flatMap((from) => [
    { from, to: other(from), ohms: ohms(2, 4) },
    { from, to: "ground", ohms: ohms(4, 4) },
  ]);
  const transistors = Array.from({ length: 2 + Math.floor(8 * next()) }, (_, i): Transistor => {
    const c = pick();
    resistors.push({ from: `b${i}`, to: other(c), ohms: ohms(2, 3) });
    resistors.push({ from: `e${i}`, to: other(c), ohms: ohms(1, 3) });
    return { kind: next() < 0.5 ? "npn" : "pnp", c, b: `b${i}`, e: `e${i}` };
  });
  return { resistors, transistors };
}

function textOf({ resistors, transistors }: ReturnType<typeof network>): string {
  return [
    "model Mnpn : npn { Is = 1 fA, beta_f = 100, beta_r = 2, Va_f = 60 V }",
    "model Mpnp : pnp { Is = 1 fA, beta_f = 100, beta_r = 2, Va_f = 60 V }",
    "ground -- V1 : voltage 10 V -- vcc",
    ...resistors.map(({ from, to, ohms }, i) => `${from} -- R${i} : resistor ${ohms} Ω -- ${to}`),
    ...transistors.map(({ kind, c, b, e }, i) => `Q${i} : M${kind} { c = ${c}, b = ${b}, e = ${e} }`),
    "show vcc.v",
  ].join("\n");
}

const V_T = (1.380649e-23 * 298.15) / 1.602176634e-19;

/** Currents into collector and base, as the books write the transport form with Early effect, in plain exponentials. */
function booked(kind: "npn" | "pnp", vbe: number, vbc: number): [number, number] {
  const sign = kind === "npn" ? 1 : -1;
  const [ef, er] = [Math.exp((sign * vbe) / V_T), Math.exp((sign * vbc) / V_T)];
  const ic = 1e-15 * (ef - er) * (1 - (sign * vbc) / 60) - (1e-15 / 2) * (er - 1);
  return [sign * ic, sign * ((1e-15 / 100) * (ef - 1) + (1e-15 / 2) * (er - 1))];
}

test("random transistor networks are solved, all but a folded one, and their currents balance by the laws of the books", () => {
  const next = stream(20);
  let solved = 0;
  let folded = 0;
  for (let trial = 0; trial < 120; trial++) {
    const made = network(next);
    const { job } = compile(textOf(made));
    // The wiring check refuses a network in which a collector hangs on nothing.
    if (job === null) continue;
    const result = solveRange(job, 0, 1);
    if (result.failures.length > 0) {
      // A branch of solutions that turns back on the way ends the ramp; the point must then say so.
      expect(result.failures[0]!.unsettled.length, textOf(made)).toBeGreaterThan(0);
      folded += 1;
      continue;
    }
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
  expect(folded).toBeLessThanOrEqual(1);
});
