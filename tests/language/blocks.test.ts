import { describe, expect, test } from "vitest";
import type { Design } from "@/lib/language/ast";
import { check } from "@/lib/language/checker";

const HEAD = `let g = 2
model d : diode { Is = 1 fA }
ground -- V1 : voltage 1 V -- in
`;

/** A circuit with blocks, and the same with every body written out where its instance stands. */
const PAIRS: readonly (readonly [what: string, blocks: string, written: string])[] = [
  [
    "two instances on nets of their own",
    `block stage(a, b) {
      a -- R1 : resistor 1 kΩ * g -- m -- D1 : d -- b
    }
    S : stage { a = in, b = k }
    T : stage { a = k, b = ground }
    show S.m.v, T.D1.i, S.a.v, T.b.v, k.v`,
    `in -- S_R1 : resistor 1 kΩ * g -- S_m -- S_D1 : d -- k
    k -- T_R1 : resistor 1 kΩ * g -- T_m -- T_D1 : d -- ground
    show S_m.v, T_D1.i, in.v, ground.v, k.v`,
  ],
  [
    "knobs with defaults, given values, tolerances and values made of them",
    `block stage(a) {
      knob R = 1 kΩ ± 5 %
      let half = R / 2
      a -- R1 : resistor half ± 1 % track pair within 0.1 % -- ground
    }
    S : stage { a = in }
    T : stage { a = in, R = 3 kΩ ± 2 % normal 3 sigma }
    U : stage { a = in, R = 2 * T.R }
    show T.R, U.half`,
    `let S_R = 1 kΩ ± 5 %
    let T_R = 3 kΩ ± 2 % normal 3 sigma
    let U_R = 2 * T_R
    let S_half = S_R / 2
    let T_half = T_R / 2
    let U_half = U_R / 2
    in -- S_R1 : resistor S_half ± 1 % track S_pair within 0.1 % -- ground
    in -- T_R1 : resistor T_half ± 1 % track T_pair within 0.1 % -- ground
    in -- U_R1 : resistor U_half ± 1 % track U_pair within 0.1 % -- ground
    show T_R, U_half`,
  ],
  [
    "blocks in blocks, with models, laws and values of the scopes around them",
    `block outer(p) {
      knob r = 2
      model local : diode { Is = 2 fA * r }
      block inner(q) {
        let g = 3
        q -- D1 : local -- x -- R1 : resistor 1 kΩ * g * r -- ground
        L1 : law { plus = x, minus = ground, amps = 1 mS * (L1.v + q.v) }
      }
      I : inner { q = p }
      J : inner { q = k }
      p -- R2 : resistor 1 kΩ * g -- k
    }
    O : outer { p = in, r = g * 2 }
    show O.J.x.v, O.I.L1.i, O.k.v, O.J.q.v`,
    `let O_r = g * 2
    model O_local : diode { Is = 2 fA * O_r }
    let O_I_g = 3
    let O_J_g = 3
    in -- O_I_D1 : O_local -- O_I_x -- O_I_R1 : resistor 1 kΩ * O_I_g * O_r -- ground
    O_I_L1 : law { plus = O_I_x, minus = ground, amps = 1 mS * (O_I_L1.v + in.v) }
    O_k -- O_J_D1 : O_local -- O_J_x -- O_J_R1 : resistor 1 kΩ * O_J_g * O_r -- ground
    O_J_L1 : law { plus = O_J_x, minus = ground, amps = 1 mS * (O_J_L1.v + O_k.v) }
    in -- O_R2 : resistor 1 kΩ * g -- O_k
    show O_J_x.v, O_I_L1.i, O_k.v, again = O_k.v`,
  ],
  [
    "names that mean something else outside",
    `let m = 1 V
    block stage(in) {
      let V1 = 5 kΩ
      in -- d : resistor V1 -- m -- R1 : resistor 1 kΩ -- ground
    }
    S : stage { in = k }
    in -- R1 : resistor 1 kΩ -- k
    show S.m.v`,
    `let m = 1 V
    let S_V1 = 5 kΩ
    k -- S_d : resistor S_V1 -- S_m -- S_R1 : resistor 1 kΩ -- ground
    in -- R1 : resistor 1 kΩ -- k
    show S_m.v`,
  ],
];

/** The design without places, dots of instances written as underscores, in an order of its own; traces by what they are. */
function meaning({ lets, models, elements, nets, shows }: Design): unknown {
  const plain = (value: unknown): unknown =>
    JSON.parse(
      JSON.stringify(value, (key, inner) => {
        if (key === "from" || key === "to") return undefined;
        if (inner instanceof Map) return [...inner];
        return typeof inner === "string" ? inner.replaceAll(".", "_") : inner;
      }),
    );
  const sorted = (items: readonly unknown[]) => items.map((item) => JSON.stringify(plain(item))).sort();
  return {
    lets: sorted(lets),
    models: sorted(models),
    elements: sorted(elements),
    nets: sorted(nets),
    shows: shows.map(({ value }) => plain(value)),
  };
}

describe("an instance means the body of its block, written out", () => {
  test.each(PAIRS)("%s", (_, blocks, written) => {
    const [a, b] = [check(HEAD + blocks), check(HEAD + written)];
    expect(b.diagnostics).toEqual([]);
    expect(a.diagnostics).toEqual([]);
    expect(meaning(a.design!)).toEqual(meaning(b.design!));
  });
});

test("a block without an instance is checked and leaves nothing in the design", () => {
  const text = `${HEAD}in -- R1 : resistor 1 kΩ -- ground\nshow in.v\nblock stage(a) {\n  knob R = 1 kΩ\n  a -- R2 : resistor R -- x\n  block inner(b) { b -- R3 : resistor R -- ground }\n}\n`;
  const { design, diagnostics } = check(text);
  expect(diagnostics).toEqual([]);
  expect(design!.elements.map(({ name }) => name)).toEqual(["V1", "R1"]);
  expect(design!.nets).toEqual(["in"]);
  expect(design!.lets.map(({ name }) => name)).toEqual(["g"]);
  const wrong = check(text.replace("R3 : resistor R", "R3 : resistor RR"));
  expect(wrong.diagnostics.map(({ code, from, to }) => [code, from, to])).toEqual([
    ["NAM3", text.indexOf("R3 : resistor") + 14, text.indexOf("R3 : resistor") + 16],
  ]);
});

test("a mistake in a block is told once, however many instances it has", () => {
  const block = "block stage(a) {\n  a -- R1 : resistor 1 V -- ground\n}\n";
  const instances = Array.from({ length: 50 }, (_, i) => `S${i} : stage { a = in }\n`).join("");
  const { diagnostics } = check(`${HEAD}${block}${instances}show in.v`);
  expect(diagnostics.map(({ code }) => code)).toEqual(["UNI3"]);
});
