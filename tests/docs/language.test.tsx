import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, test } from "vitest";
import { solved } from "@/app/docs/_parts/solved";
import LanguagePage from "@/app/docs/language/page";
import { STATEMENTS, WIRING } from "@/app/docs/language/statements";
import { TOLERANCE_SAMPLE } from "@/app/docs/language/tolerances";
import { UNIT_NAMES } from "@/app/docs/language/unit-names";
import { compile } from "@/lib/analyses/compile";
import { FUNCTION_NAMES } from "@/lib/language/functions";
import { KINDS } from "@/lib/language/kinds";
import { CLAUSE_WORDS, CONSTANTS, PRECEDENCE, STATEMENT_WORDS } from "@/lib/language/token";
import { PREFIXES } from "@/lib/units/prefix";
import { PLAIN_UNITS, UNITS } from "@/lib/units/unit";

const page = renderToStaticMarkup(<LanguagePage />);
const samples = [
  ...Object.entries(STATEMENTS),
  ...Object.entries(WIRING),
  ["tolerances", { sample: TOLERANCE_SAMPLE }] as const,
].flatMap(([name, { sample }]) => (sample === null ? [] : [{ name, sample }]));

/** Those of `ids` at which nothing stands. */
function missing(ids: readonly string[]): string[] {
  return ids.filter((id) => !page.includes(` id="${id}"`));
}

describe("the page of the language", () => {
  test("has every statement, and none that is no statement", () => {
    expect(Object.keys(STATEMENTS).sort()).toEqual([...STATEMENT_WORDS].sort());
    expect(missing([...STATEMENT_WORDS].map((word) => `statement.${word}`))).toEqual([]);
  });

  test("uses every word that means something inside a statement", () => {
    const forms = [...Object.values(STATEMENTS), ...Object.values(WIRING)].flatMap((one) => one.forms);
    const text = `${forms.join(" ")} ${page}`;
    expect([...CLAUSE_WORDS].filter((word) => !new RegExp(`\\b${word}\\b`).test(text))).toEqual([]);
  });

  test("has every kind, unit, prefix, function, constant and operator", () => {
    const units = [...UNITS.keys(), ...PLAIN_UNITS.keys(), "°C"];
    expect(
      missing([
        ...Object.keys(KINDS).map((kind) => `kind.${kind}`),
        ...units.map((unit) => `unit.${unit === "%" ? "percent" : unit}`),
        ...[...FUNCTION_NAMES].map((name) => `function.${name}`),
        ...[...CONSTANTS].map((name) => `constant.${name}`),
        ...[...PRECEDENCE.values()].map((level) => `operator.${level}`),
      ]),
    ).toEqual([]);
    expect(Object.keys(UNIT_NAMES).sort()).toEqual([...units].sort());
    expect([...PREFIXES.keys()].filter((prefix) => !page.includes(`<code>${prefix}</code>`))).toEqual([]);
  });

  test("says of every operator what it asks", () => {
    expect(page).not.toMatch(/<td[^>]*><\/td>/);
  });

  test("names an address once", () => {
    const ids = [...page.matchAll(/ id="([^"]*)"/g)].map(([, id]) => id);
    expect(ids.length).toBe(new Set(ids).size);
    const links = [...page.matchAll(/href="#([^"]*)"/g)].map(([, id]) => decodeURIComponent(id!));
    expect(links.filter((id) => !ids.includes(id))).toEqual([]);
  });

  test.each(samples)("shows a netlist for $name that is right and solved", ({ name, sample }) => {
    const { diagnostics, job } = compile(sample);
    expect(diagnostics).toEqual([]);
    if (name in STATEMENTS) expect(sample).toMatch(new RegExp(`^${name}\\b`, "m"));
    if (job!.design.seek !== null) return;
    const { readings, requirements } = solved(sample)!;
    expect(readings.filter(({ value }) => value === "no data")).toEqual([]);
    expect(requirements.filter(({ verdict }) => verdict !== "holds")).toEqual([]);
  });
});
