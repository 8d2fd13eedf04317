import { describe, expect, test, vi } from "vitest";
import { compile } from "@/lib/analyses/compile";
import { System } from "@/lib/circuit/system";
import { Aided } from "@/lib/solver/aided";
import { deflated } from "@/lib/solver/deflation";
import { LinearSolver } from "@/lib/solver/linear";
import { type Bench, newton } from "@/lib/solver/newton";
import { partner } from "@/lib/solver/partner";
import { Seeker, seek } from "@/lib/solver/seek";
import { tied } from "@/lib/solver/shunt-ramp";
import { SEVERAL, textOf } from "../outside/several-solutions";

vi.setConfig({ testTimeout: 60_000 });

function systemOf(text: string): System {
  const { job, diagnostics } = compile(text);
  if (job === null) throw new Error(diagnostics.map(({ message }) => message).join(" "));
  return new System(job.design, job.circuit);
}

function benchOf(system: System): Bench {
  system.startCold();
  system.assemble();
  const linear = new LinearSolver(system.pattern, system.state.jacobian);
  const step = new Float64Array(system.circuit.size);
  return { system, linear, step, assemble: () => system.assemble() };
}

const FLIP_FLOP = textOf(SEVERAL.find(({ id }) => id === "MS3")!);
const manifold = SEVERAL.filter(({ solutions }) => solutions.length > 1);

/** The flip-flop of the record MS3, its three points (v1 low, middle, v1 high), and a bench to go to and fro on. */
function flipFlop() {
  const system = systemOf(FLIP_FLOP);
  const bench = benchOf(system);
  const v1 = system.circuit.nets.get("v1")!;
  const points = seek(system, 3).points.toSorted((a, b) => a.x[v1]! - b.x[v1]!);
  const put = (x: ArrayLike<number>) => {
    system.state.x.set(x);
    system.state.low.fill(0);
  };
  /** Which of the three points Newton's method reaches from the unknowns at hand. */
  const settled = () => {
    system.settle();
    expect(newton(bench, true, 60).kind).toBe("converged");
    return points.findIndex(({ x }) => Math.abs(x[v1]! - system.state.x[v1]!) < 1e-9);
  };
  return { system, bench, points, put, settled };
}

describe("deflation", () => {
  /** Where deflation leads from a start between the two stable points; null where it comes to nothing. */
  function explorer() {
    const { bench, points, put, settled } = flipFlop();
    const [low, , high] = points.map(({ x }) => x) as [Float64Array, Float64Array, Float64Array];
    return (known: readonly number[], share: number) => {
      put(low.map((value, j) => value + share * (high[j]! - value)));
      const solutions = known.map((k) => points[k]!.x);
      return deflated(bench, solutions, { iterations: 0 }) ? settled() : null;
    };
  }

  test.each([0.05, 0.1, 0.15])(
    "leads from one start, %d of the way, to another point once the first is known",
    (share) => {
      const reached = explorer();
      expect(reached([], share)).toBe(0);
      expect(reached([0], share)).toBe(1);
      expect(reached([1], 1 - share)).toBe(2);
      expect(reached([2], 1 - share)).toBe(1);
    },
  );

  test("never leads to a point that is known", () => {
    const reached = explorer();
    for (const known of [[0], [2], [0, 2], [0, 1], [1, 2], [0, 1, 2]]) {
      for (let share = 0.05; share < 1; share += 0.05) expect(known).not.toContain(reached(known, share));
    }
  });
});

describe("scattered starts", () => {
  test("held at voltages on either side and let go, the flip-flop falls to that side", () => {
    const { system, bench, settled } = flipFlop();
    const aided = new Aided(system);
    for (const [v1, v2, state] of [
      [0, 5, 0],
      [5, 0, 2],
    ] as const) {
      aided.origin.fill(0);
      aided.origin[system.circuit.nets.get("v1")!] = v1;
      aided.origin[system.circuit.nets.get("v2")!] = v2;
      expect(tied(bench, aided).kind).toBe("converged");
      expect(settled()).toBe(state);
    }
  });

  test("are the same whatever was sought before", () => {
    const text = textOf(SEVERAL.find(({ id }) => id === "MS4")!);
    const system = systemOf(text);
    const seeker = new Seeker(system);
    const at = (volts: number) => {
      system.turn("VIN", volts);
      return seeker.seek(9);
    };
    const first = at(2.4);
    at(0.3);
    expect(at(2.4)).toEqual(first);
    const another = systemOf(text);
    another.turn("VIN", 2.4);
    expect(seek(another, 9)).toEqual(first);
  });
});

describe("the curve from a solution to its partner", () => {
  test("joins the middle point to one of the stable ones, and leaves the other without", () => {
    const { system, bench, points, put, settled } = flipFlop();
    const aided = new Aided(system);
    const partners = points.map(({ x }) => {
      put(x);
      return partner(bench, aided, 0, { iterations: 0 }) ? settled() : null;
    });
    const joined = partners[1]!;
    expect([0, 2]).toContain(joined);
    expect(partners[joined]).toBe(1);
    expect(partners[2 - joined]).toBeNull();
  });

  test("finds the middle point of the bandgap reference at every temperature, which starts alone miss", () => {
    const system = systemOf(`model one : npn { Is = 0.4 fA, beta_f = 240, Eg = 1.17 V, x = 3.2 }
model eight : npn { Is = 3.2 fA, beta_f = 240, Eg = 1.17 V, x = 3.2 }
model amp : opamp { gain = 1e4, offset = -0.5 mV, out_low = 0 V, out_high = 4.5 V }
A1 : amp { plus = b, minus = a, out = ref }
ref -- R1 : resistor 10 kΩ -- b
ref -- R2 : resistor 10 kΩ -- a
Q1 : one { c = b, b = b, e = ground }
a -- R3 : resistor 1 kΩ -- f
Q2 : eight { c = f, b = f, e = ground }
show ref.v`);
    for (let kelvin = 273.15; kelvin <= 334; kelvin += 2.5) {
      system.turn("temperature", kelvin);
      const { points, isComplete } = seek(system, 5);
      expect(points.map(({ isStable, index }) => [isStable, index])).toEqual([
        [true, 1],
        [false, -1],
        [true, 1],
      ]);
      expect(isComplete).toBe(true);
    }
  });
});

describe("the alarm of the indices", () => {
  test.each(manifold)("is silent for all of $id, and rings when one is left out", (record) => {
    const system = systemOf(textOf(record));
    const all = seek(system, 9);
    expect(all.isComplete).toBe(true);
    // No more are looked for than are asked for, so that one is missing.
    const fewer = seek(system, all.points.length - 1);
    expect(fewer.points).toHaveLength(all.points.length - 1);
    expect(fewer.isComplete).toBe(false);
  });

  test("goes by the indices, which are +1 and −1 in turn and add up to 1", () => {
    for (const record of manifold) {
      const indices = seek(systemOf(textOf(record)), 9).points.map(({ index }) => index);
      expect(indices.toSorted()).toEqual([-1, 1, 1]);
    }
  });

  test("two flip-flops that have nothing to do with each other have nine points, every one of a product", () => {
    const body = (tag: string) =>
      FLIP_FLOP.split("\n")
        .filter((line) => !/^(show|model|knob|title)/.test(line))
        .join("\n")
        .replace(/\b(v1|v2|vcc|V1|R1|R2|Q1|Q2)\b/g, (name) => `${name}${tag}`);
    const heads = FLIP_FLOP.split("\n").filter((line) => /^(model|knob)/.test(line));
    const system = systemOf([...heads, body("a"), body("b"), "show v1a.v, v1b.v"].join("\n"));
    const found = seek(system, 32);
    expect(found.isComplete).toBe(true);
    const state = (volts: number) => (volts < 0.1 ? "low" : volts < 0.77 ? "middle" : "high");
    const [a, b] = ["v1a", "v1b"].map((net) => system.circuit.nets.get(net)!) as [number, number];
    const named = found.points.map(({ x }) => `${state(x[a]!)} ${state(x[b]!)}`);
    const sides = ["high", "low", "middle"];
    expect(named.toSorted()).toEqual(sides.flatMap((one) => sides.map((other) => `${one} ${other}`)));
    expect(found.points.filter(({ isStable }) => isStable)).toHaveLength(4);
  });
});

describe("stability", () => {
  // A ring of three equal inverting stages, each of transconductance g into R and C: its modes are −1 + g·R·e^{±jπ/3} and
  // −1 − g·R in units of 1/RC, so it rests where g·R < 2 and oscillates beyond (Sedra and Smith, ring oscillators; from memory).
  test.each([
    [1.9, true],
    [2.1, false],
  ])("a ring of three inverters of gain %d", (gain, isStable) => {
    const stage = (from: string, to: string) =>
      `${to} -- R${to} : resistor 1 kΩ -- ground\nL${to} : law { plus = ${to}, minus = ground, amps = ${gain} mS * ${from}.v }`;
    const { points, isComplete } = seek(
      systemOf(`${stage("a", "b")}\n${stage("b", "c")}\n${stage("c", "a")}\nshow a.v`),
      3,
    );
    // The odd index alone would not tell: it sees one mode or three, not two.
    expect(points.map((point) => [point.isStable, point.index])).toEqual([[isStable, 1]]);
    expect(isComplete).toBe(true);
  });
});
