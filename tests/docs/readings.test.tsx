import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, test } from "vitest";
import { solved } from "@/app/docs/_parts/solved";
import { CONTRACT_SAMPLE } from "@/app/docs/readings/judging";
import ReadingsPage from "@/app/docs/readings/page";
import { REDUCTION_TEXTS, readingNetlist } from "@/app/docs/readings/reductions";
import { RELATIONS } from "@/app/docs/readings/relations";
import { compile } from "@/lib/analyses/compile";
import { REDUCTIONS } from "@/lib/language/reductions";
import { OUTCOMES } from "@/lib/solver/outcome";

const page = renderToStaticMarkup(<ReadingsPage />);

describe("the page of the readings", () => {
  test("has every reduction, every relation and every outcome at an address of its own", () => {
    const wanted = [
      ...Object.keys(REDUCTIONS).map((name) => `reading.${name}`),
      ...RELATIONS.map(({ id }) => `relation.${id}`),
      ...OUTCOMES.map((outcome) => `outcome.${outcome.replaceAll(" ", "-")}`),
    ];
    expect(wanted.filter((id) => !page.includes(` id="${id}"`))).toEqual([]);
    expect(Object.keys(REDUCTION_TEXTS).sort()).toEqual(Object.keys(REDUCTIONS).sort());
  });

  test("names an address once, and leads nowhere that is not there", () => {
    const ids = [...page.matchAll(/ id="([^"]*)"/g)].map(([, id]) => id);
    expect(ids.length).toBe(new Set(ids).size);
    const links = [...page.matchAll(/href="#([^"]*)"/g)].map(([, id]) => id);
    expect(links.filter((id) => !ids.includes(id))).toEqual([]);
  });

  test.each(Object.entries(REDUCTION_TEXTS))("reads %s from a sweep that is solved", (name, { sample }) => {
    const text = readingNetlist(sample);
    expect(compile(text).diagnostics).toEqual([]);
    expect(sample).toContain(`${name}(`);
    const { readings } = solved(text)!;
    expect(readings).toHaveLength(1);
    expect(readings[0]!.value).toMatch(/\d/);
  });

  test("gives the figures that follow from the law of the junction", () => {
    // V = V_T·ln(1 + I/Is) + Rs·I with V_T = 25.6926 mV (CODATA constants at 298.15 K), worked out by hand.
    const value = (read: string) => solved(readingNetlist(read))!.readings[0]!.value;
    expect(value(REDUCTION_TEXTS.highest.sample)).toBe("713.9\u202fmV");
    expect(value(REDUCTION_TEXTS.lowest.sample)).toBe("355.0\u202fmV");
    expect(value(REDUCTION_TEXTS.error_from.sample)).toBe("4.000\u202fmV");
    // 4 Ω costs 1 mV at 250 µA; the last point of ten a decade below it is 199.5 µA, 5.3 decades above 1 nA.
    expect(value(REDUCTION_TEXTS.decades_where.sample)).toBe("5.300");
  });

  test("shows a contract of which every requirement holds", () => {
    expect(compile(CONTRACT_SAMPLE).diagnostics).toEqual([]);
    const { requirements } = solved(CONTRACT_SAMPLE)!;
    expect(requirements.map(({ verdict }) => verdict)).toEqual(["holds", "holds", "holds", "holds"]);
  });
});
