import { describe, expect, test } from "vitest";
import { checkWiring } from "@/lib/circuit/wiring";
import { check } from "@/lib/language/checker";

const SHELVES: Readonly<Record<string, string>> = {
  arrays: `let Is_a = 0.4 fA ± 20 % track array within 1 %
    knob beta = 240
    model array : npn { Is = Is_a, beta_f = beta }
    model amp : opamp { gain = 2e6 }
    block log_stage(in, out) {
      knob offset_resistor = 1 kΩ
      Q : array { c = in, b = x, e = out }
      A : amp { plus = ground, minus = in, out = out }
      x -- R : resistor offset_resistor -- ground
    }`,
  "arrays@2": "model array : npn { Is = 1 fA }",
  outer: 'use "arrays"\nblock pair(a, b) {\n  S : log_stage { in = a, out = b, offset_resistor = 2 kΩ }\n}',
  broken: "let a = 1 V\nlet b = 2 A + a\nlet c = nothing\n",
  itself: 'use "other"\nmodel m : npn { Is = 1 fA }',
  other: 'use "itself"',
};

const library = (name: string, revision: number | null): string | null =>
  SHELVES[revision === null ? name : `${name}@${revision}`] ?? null;

const problems = (text: string, options = { library }) =>
  check(text, options).diagnostics.map(({ code, from, to, message }) => [
    code,
    text.slice(from, to),
    message,
  ]);

const stage = (use: string, of: string) => `${use}
  ground -- I1 : current 1 µA -- in
  S : ${of}
  show out.v`;

describe("use brings in models and blocks, and the values they need", () => {
  const text = stage('use "arrays"', "log_stage { in = in, out = out }");
  const { design, diagnostics } = check(text, { library });

  test("without a problem, wired as if they stood in the file", () => {
    expect(diagnostics).toEqual([]);
    expect(checkWiring(design!)).toEqual([]);
    expect(design!.elements.map(({ name, model }) => [name, model])).toEqual([
      ["I1", null],
      ["S.Q", "array"],
      ["S.A", "amp"],
      ["S.R", null],
    ]);
    expect(design!.nets).toEqual(["in", "out", "S.x"]);
  });

  test("the values of a shelf are out of reach of names in the file; its knobs are values", () => {
    expect(design!.lets.map(({ name }) => name)).toEqual([
      '"arrays".Is_a',
      '"arrays".beta',
      "S.offset_resistor",
    ]);
    expect(design!.lets[0]!.tolerance).toMatchObject({ amount: 0.2, track: { within: 0.01 } });
    expect(design!.knobs.map(({ name }) => name)).toEqual(["temperature"]);
    expect(problems(`${text}\nlet Is_a = 1 V\nlet beta = Is_a`)).toEqual([]);
  });

  test("a shelf may use another, whose names the file does not see", () => {
    const nested = stage('use "outer"', "pair { a = in, b = out }");
    const checked = check(nested, { library });
    expect(checked.diagnostics).toEqual([]);
    expect(checked.design!.elements.map(({ name, model }) => [name, model])).toEqual([
      ["I1", null],
      ["S.S.Q", '"outer".array'],
      ["S.S.A", '"outer".amp'],
      ["S.S.R", null],
    ]);
    expect(problems(nested.replace("pair { a = in, b = out }", "log_stage { in = in, out = out }"))).toEqual([
      ["NAM5", "log_stage", expect.stringContaining("No kind or model")],
    ]);
  });

  test("a revision is asked for by its number", () => {
    const pinned =
      'use "arrays" revision 2\nin -- R1 : resistor 1 kΩ -- ground\nQ : array { c = in, b = in, e = ground }\nshow in.v';
    const checked = check(pinned, { library });
    expect(checked.diagnostics).toEqual([]);
    expect(checked.design!.models.map(({ params }) => params.get("Is")!.value)).toMatchObject([
      { value: 1e-15 },
    ]);
  });
});

describe("what cannot be used is said once, where it is used", () => {
  test.each([
    ['use "nowhere"', "NAM13", '"nowhere" is not on the shelf'],
    ['use "arrays" revision 9', "NAM13", 'Revision 9 of "arrays"'],
    ['use "broken"', "NAM14", "in line 2 (UNI4)"],
    ['use "itself"', "NAM14", "problem of its own"],
  ])("%s", (use, code, says) => {
    expect(problems(stage(use, "log_stage { in = in, out = out }"))).toEqual([
      [code, use.slice(4).split(" ")[0], expect.stringContaining(says)],
    ]);
  });

  test("where no shelf is at hand", () => {
    const text = stage('use "arrays"', "log_stage { in = in, out = out }");
    expect(check(text).diagnostics).toMatchObject([
      { code: "NAM13", message: expect.stringContaining("No shelf") },
    ]);
  });

  test("a revision that is no whole number", () => {
    const text = 'use "arrays" revision 1.5\nshow temperature';
    expect(problems(text)).toEqual([["PLN4", "1.5", expect.stringContaining("whole number")]]);
  });

  test("names that clash, at the use or at the later of two", () => {
    expect(problems('use "arrays"\nlet array = 1 V\nshow temperature')).toEqual([
      ["NAM1", "array", expect.stringContaining("already a model")],
    ]);
    const twice = problems('use "arrays"\nuse "arrays"\nshow temperature');
    expect(twice).toEqual([["FRM9", 'use "arrays"', expect.stringContaining("used twice")]]);
  });

  test("a value of the wrong unit for a knob of a block from a shelf", () => {
    const text = stage('use "arrays"', "log_stage { in = in, out = out, offset_resistor = 1 V }");
    expect(problems(text)).toEqual([["UNI3", "1 V", expect.stringContaining("`offset_resistor`")]]);
  });
});

test("shelves that use each other without end of them are answered at once", () => {
  let asked = 0;
  const many = (name: string): string => {
    asked += 1;
    const level = name.length;
    return level > 40 ? "let a = 1 V" : `use "${name}a"\nuse "${name}b"\nlet a = 1 V`;
  };
  const { diagnostics } = check('use "x"\nshow temperature', { library: many });
  expect(diagnostics).toMatchObject([{ code: "NAM14" }]);
  expect(asked).toBeLessThan(10_000);
});
