import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  allBoxes,
  namesAt,
  netsWithPins,
  sayBox,
  sayNet,
  spanOf,
  standsFor,
} from "@/app/_components/drawing/chosen";
import { check } from "@/lib/language/checker";
import { place, TEXT } from "../language/symbols/netlist";
import { anyText, EXAMPLES } from "../language/texts";
import { connected } from "./netlists";

const found = connected(TEXT);
const named = (name: string) => allBoxes(found.rows).find((box) => box.name === name)!;

describe("what is connected to what", () => {
  test("has the rows of the text, with what is inside instances under dotted names", () => {
    expect(found.rows.map((row) => row.map(({ name }) => name))).toEqual([
      ["IS"],
      ["S"],
      ["RL"],
      ["R2"],
      ["R3"],
    ]);
    expect(named("S").inside!.map((row) => row.map(({ name }) => name))).toEqual([
      ["S.Q"],
      ["S.RE"],
      ["S.A"],
    ]);
    expect([...found.nets.keys()]).toEqual(["ground", "s", "ls", "S.x", "x"]);
  });

  test("joins pins to nets by their names, those of a head to the nets outside", () => {
    expect(sayBox(named("S"))).toBe("S, log_stage: in to s, out to ls");
    expect(sayBox(named("S.Q"))).toBe("S.Q, array: c to s, b to ground, e to S.x");
    expect(sayBox(named("S.RE"))).toBe("S.RE, resistor R: left to S.x, right to ls");
    const pins = netsWithPins(found);
    expect(sayNet("ls", pins.get("ls")!)).toBe("net ls: S.RE.right, S.A.out, RL.left, R2.right");
    expect(pins.get("ground")).toEqual(["IS.left", "S.Q.b", "S.A.plus", "RL.right", "R3.right"]);
  });

  test("tells of pins that are joined to nothing, and of what was written of a kind that nobody knows", () => {
    const half = connected(
      "model q : npn { Is = 1 fA }\nQ : q { c = a }\nX : nothing { one = a, two = b }\n",
    );
    expect(allBoxes(half.rows).map(sayBox)).toEqual([
      "Q, q: c to a, b open, e open",
      "X, nothing: one to a, two to b",
    ]);
  });

  test("is linked with the text both ways", () => {
    expect(spanOf(found, "RL")!.from).toBe(place("RL : resistor"));
    expect(spanOf(found, "S.Q")!.from).toBe(place("Q : array"));
    expect(spanOf(found, "s")!.from).toBe(place("s\nS :"));
    expect(spanOf(found, "nothing")).toBeNull();
    expect(namesAt(found, place("resistor R_out"), [])).toEqual(["RL"]);
    expect(namesAt(found, place("ls -- RL"), [])).toEqual(["ls"]);
    expect(namesAt(found, place("Q : array"), ["S.Q"])).toEqual(["S.Q"]);
    expect(namesAt(found, place("sweep"), ["I_in"])).toEqual([]);
  });

  test("a closed instance stands for what is inside it", () => {
    expect(standsFor(named("S"), ["S.x"], false)).toBe(true);
    expect(standsFor(named("S"), ["S.x"], true)).toBe(false);
    expect(standsFor(named("RL"), ["S.x"], false)).toBe(false);
  });

  test("a block that contains itself ends", () => {
    const own = connected(
      "block b(a) {\n  X : b { a = a }\n}\nY : b { a = n }\nn -- R : resistor 1 Ω -- ground\n",
    );
    expect(allBoxes(own.rows).length).toBeLessThan(40);
  });
});

describe("in every example", () => {
  test.each(EXAMPLES)("%s: elements and nets are those of the checked circuit", (_, text) => {
    const { design } = check(text);
    const { rows, nets } = connected(text);
    const elements = allBoxes(rows).filter(({ inside }) => inside === null);
    expect(elements.map(({ name }) => name).sort()).toEqual(design!.elements.map(({ name }) => name).sort());
    expect([...nets.keys()].filter((net) => net !== "ground").sort()).toEqual([...design!.nets].sort());
    const pins = new Map(design!.elements.map((one) => [one.name, one.pins]));
    for (const { name, joints } of elements) {
      expect(Object.fromEntries(joints.map(({ pin, net }) => [pin, net]))).toEqual(pins.get(name));
    }
  });
});

test("no text makes it throw, and every net that a pin names is known", { timeout: 60_000 }, () => {
  fc.assert(
    fc.property(anyText, (text) => {
      const { rows, nets } = connected(text);
      for (const { joints } of allBoxes(rows)) {
        for (const { net } of joints) if (net !== null) expect(nets.has(net)).toBe(true);
      }
    }),
    { seed: 3, numRuns: 300 },
  );
});
