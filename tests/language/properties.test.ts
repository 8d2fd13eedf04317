import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { checkWiring } from "@/lib/circuit/wiring";
import type { Design } from "@/lib/language/ast";
import { CATALOGUE } from "@/lib/language/catalogue";
import { check } from "@/lib/language/checker";
import type { Diagnostic } from "@/lib/language/diagnostic";
import { format } from "@/lib/language/format";
import { highlight } from "@/lib/language/highlight";
import { lex } from "@/lib/language/lexer";
import { parse } from "@/lib/language/parser";
import { anyText, EXAMPLES, mutatedExample, wellFormed } from "./texts";

const RUNS = { numRuns: 1500 };

function expectSound(text: string, diagnostics: readonly Diagnostic[]): void {
  for (const { code, from, to, message, fix } of diagnostics) {
    expect(code in CATALOGUE).toBe(true);
    expect(0 <= from && from <= to && to <= text.length).toBe(true);
    expect(message.length).toBeLessThan(600);
    if (fix !== undefined) expect(0 <= fix.from && fix.from <= fix.to && fix.to <= text.length).toBe(true);
  }
  const places = diagnostics.map((one) => one.from);
  expect(places).toEqual([...places].sort((a, b) => a - b));
}

/** The design without its places in the text. */
function meaning(design: Design | null): string {
  return JSON.stringify(design, (key, value) => {
    if (key === "from" || key === "to") return undefined;
    if (key === "netPlaces") return [...value.keys()];
    return value instanceof Map ? [...value] : value;
  });
}

/** What stands in quotation marks is kept, the rest is changed. */
function outsideStrings(text: string, change: (part: string) => string): string {
  return text
    .split(/("[^"\n]*")/u)
    .map((part, i) => (i % 2 === 0 ? change(part) : part))
    .join("");
}

describe("any text", { timeout: 60_000 }, () => {
  test("is answered with sound diagnostics, sorted, and a design exactly where there is no error", () => {
    fc.assert(
      fc.property(anyText, (text) => {
        const { design, diagnostics } = check(text);
        expectSound(text, diagnostics);
        expect(design === null).toBe(diagnostics.some((one) => one.severity === "error"));
        if (design !== null) expectSound(text, checkWiring(design));
      }),
      RUNS,
    );
  });

  test("is cut into tokens that lie in order and leave out nothing but blanks", () => {
    fc.assert(
      fc.property(anyText, (text) => {
        let at = 0;
        for (const { from, to } of lex(text).tokens) {
          expect(from >= at && to > from).toBe(true);
          expect(text.slice(at, from).trim()).toBe("");
          at = to;
        }
        expect(text.slice(at).trim()).toBe("");
      }),
      RUNS,
    );
  });

  test("has statements that lie in order", () => {
    fc.assert(
      fc.property(anyText, (text) => {
        let at = 0;
        for (const { from, to } of parse(text).netlist.statements) {
          expect(from >= at && to >= from && to <= text.length).toBe(true);
          at = to;
        }
      }),
      RUNS,
    );
  });

  test("is coloured in stretches that lie in order", () => {
    fc.assert(
      fc.property(anyText, (text) => {
        let at = 0;
        for (const { from, to } of highlight(text)) {
          expect(from >= at && to > from && to <= text.length).toBe(true);
          at = to;
        }
      }),
      RUNS,
    );
  });
});

describe("the formatter", { timeout: 60_000 }, () => {
  test.each([
    ["any text", anyText],
    ["statements of good form", wellFormed],
  ])("is idempotent on %s and keeps its problems", (_, texts) => {
    fc.assert(
      fc.property(texts, (text) => {
        const once = format(text);
        expect(format(once)).toBe(once);
        expect(once).not.toMatch(/[^\S\n]\n|\n\n\n|^\n/u);
        expect(parse(once).diagnostics.map((one) => one.code)).toEqual(
          parse(text).diagnostics.map((one) => one.code),
        );
      }),
      RUNS,
    );
  });

  test("keeps the comments and the meaning", () => {
    fc.assert(
      fc.property(fc.oneof(mutatedExample, wellFormed), (text) => {
        const once = format(text);
        const comments = (of: string): string[] =>
          lex(of)
            .tokens.filter((token) => token.kind === "comment")
            .map((token) => token.text);
        expect(comments(once)).toEqual(comments(text));
        const [before, after] = [check(text), check(once)];
        expect(meaning(after.design)).toBe(meaning(before.design));
        expect(after.diagnostics.map((one) => one.code)).toEqual(before.diagnostics.map((one) => one.code));
      }),
      RUNS,
    );
  });

  test.each(EXAMPLES)("keeps the meaning of %s however it is spaced", (_, text) => {
    const { design, diagnostics } = check(text);
    expect(diagnostics).toEqual([]);
    const squeezed = outsideStrings(text, (part) =>
      part.replace(/ *(?<![-+/^·])([=:{},±*]) */gu, "$1").replace(/([\w²]) +#/gu, "$1#"),
    );
    const spread = outsideStrings(text, (part) =>
      part.replace(/((?<![<>])=|[:{},*()])/gu, "  $1   ").replace(/\n/gu, "  \r\n"),
    );
    for (const other of [squeezed, spread, text.replaceAll("Ω", "ohm").replaceAll("µ", "u")]) {
      expect(meaning(check(other).design)).toBe(meaning(design));
      expect(meaning(check(format(other)).design)).toBe(meaning(design));
    }
    expect(format(squeezed).replace(/ *#.*/gu, "")).toBe(format(text).replace(/ *#.*/gu, ""));
  });
});
