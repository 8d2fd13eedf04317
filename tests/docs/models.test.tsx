import { readFileSync } from "node:fs";
import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, test } from "vitest";
import { parseFormula } from "@/app/docs/_parts/formula";
import { solved } from "@/app/docs/_parts/solved";
import { MODELS, TEMPERATURE } from "@/app/docs/models/equations";
import ModelsPage from "@/app/docs/models/page";
import { SYMBOLS } from "@/app/docs/models/symbols";
import { compile } from "@/lib/analyses/compile";
import { KINDS } from "@/lib/language/kinds";

/** The words of a source file, its comments without their marks. */
function wordsOf(file: string): string {
  return readFileSync(file, "utf8").replace(/\s+\*\s+/g, " ");
}

const page = renderToStaticMarkup(<ModelsPage />);

describe("the page of the models", () => {
  test("has every kind and every parameter of the language, each at an address of its own", () => {
    const wanted = Object.entries(KINDS).flatMap(([kind, { parameters }]) => [
      kind,
      ...Object.keys(parameters).map((name) => `${kind}.${name}`),
    ]);
    expect(wanted.length).toBeGreaterThan(60);
    expect(wanted.filter((id) => !page.includes(` id="${id}"`))).toEqual([]);
  });

  test("has a symbol for every parameter, and none for what is no parameter", () => {
    const names = new Set(Object.values(KINDS).flatMap(({ parameters }) => Object.keys(parameters)));
    expect(Object.keys(SYMBOLS).sort()).toEqual([...names].sort());
  });

  test("sets units upright, as words", () => {
    const formulas = Object.values(MODELS).flatMap(({ equations }) =>
      equations.flatMap((one) => one.formulas),
    );
    expect(formulas.filter((formula) => /\d "K"/.test(formula))).toHaveLength(1);
    expect(formulas.filter((formula) => /\d\s*(?:K|V|A|Ω)(?!\w)/u.test(formula))).toEqual([]);
  });

  test("has every parameter in an equation, under the symbol of the table", () => {
    const written = [
      ...Object.values(TEMPERATURE),
      ...Object.values(MODELS).flatMap(({ equations }) =>
        equations.flatMap(({ says, formulas }) => [says, ...formulas]),
      ),
    ].join(" | ");
    expect(Object.keys(SYMBOLS).filter((name) => !written.includes(SYMBOLS[name]!))).toEqual([]);
  });

  test.each(Object.values(MODELS).flatMap(({ sources }) => sources))(
    "cites what $file cites: $cites",
    ({ cites, file }) => {
      expect(wordsOf(file)).toContain(cites);
    },
  );

  test.each(Object.entries(MODELS))("solves the netlist shown for %s, which uses it", (kind, { sample }) => {
    const { diagnostics, job } = compile(sample);
    expect(diagnostics).toEqual([]);
    expect(job!.design.elements.map((one) => one.kind)).toContain(kind);
    const { readings, requirements } = solved(sample)!;
    expect(readings.filter(({ value }) => value === "no data")).toEqual([]);
    expect(requirements.filter(({ verdict }) => verdict !== "holds")).toEqual([]);
  });

  test("gives no answer to a netlist with an error", () => {
    expect(solved("ground -- R1 : resistor 1 kΩ -- out")).toBeNull();
  });
});

describe("a formula", () => {
  test("is read as it is to be set", () => {
    expect(parseFormula("V_T = frac{k T}{q}")).toMatchObject({
      kind: "row",
      terms: [
        { kind: "scripts", base: { text: "V" }, under: { text: "T" }, over: null },
        { kind: "sign", text: "=" },
        { kind: "fraction", top: { kind: "row" }, bottom: { kind: "name", text: "q" } },
      ],
    });
  });

  test.each(["{", "frac{1}", "a}", "sqrt 2"])("with a mistake is refused: %s", (text) => {
    expect(() => parseFormula(text)).toThrow(SyntaxError);
  });
});
