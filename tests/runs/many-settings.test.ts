import { createElement } from "react";
import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, test } from "vitest";
import { ReadingList } from "@/app/(work)/[workspace]/runs/[id]/reading-list";
import { ReportReadings } from "@/app/(work)/[workspace]/runs/[id]/report/report-readings";
import {
  listedOnly,
  MOST_LISTED,
  numbersIn,
  settingsOf,
  subjectsOf,
} from "@/app/(work)/[workspace]/runs/[id]/spread/subjects";
import { ComparedReadings } from "@/app/(work)/[workspace]/runs/compare/compared-readings";
import type { ReadingDocument } from "@/lib/analyses/result";
import { formatQuantity } from "@/lib/units/quantity";

/** A run of 200,000 settings, and one of a thousand readings: the server renders what is said of them, for everybody who waits. */
const axes = (settings: number) => [
  { knob: "k", unit: "V", scale: "linear" as const, values: [1, 2] },
  { knob: "m", unit: "V", scale: "linear" as const, values: Array.from({ length: settings }, (_, k) => k) },
];
const readings = (count: number, settings: number, draws = 0): ReadingDocument[] =>
  Array.from({ length: count }, (_, k) => ({
    name: `r${k}`,
    unit: "V",
    per: "sweep",
    values: Array.from({ length: settings * (draws + 1) }, (_, at) => at),
  }));
const links = { lines: {}, readingLines: {} } as never;
const rowsIn = (page: string) => page.split("<tr").length - 2;

describe("of a run with very many settings", () => {
  const [read] = [readings(1, 200_000)];
  const wide = axes(200_000);

  test("pages list the first, and say that there are more", () => {
    expect(settingsOf(wide)).toHaveLength(MOST_LISTED);
    for (const page of [
      renderToStaticMarkup(createElement(ReadingList, { readings: read, axes: wide, links })),
      renderToStaticMarkup(createElement(ReportReadings, { readings: read, axes: wide, draws: 0 })),
      renderToStaticMarkup(
        createElement(ComparedReadings, {
          runs: ["A", "B"].map((head) => {
            return { head, readings: read, settings: settingsOf(wide), settingCount: 200_000 };
          }),
        }),
      ),
    ]) {
      expect(rowsIn(page)).toBe(MOST_LISTED);
      expect(page).toContain("The first 500 settings of 200\u202f000");
    }
  });

  test("whether draws spread a reading is known without going through them", () => {
    const matter = { axes: wide, requirements: [], budgets: [], causes: [] };
    expect(subjectsOf({ ...matter, readings: read })).toEqual([]);
    expect(subjectsOf({ ...matter, readings: readings(1, 200_000, 1) })).toHaveLength(1);
  });

  test("what is sent of the readings before their document is what lists show of them", () => {
    const many = readings(1_000, 2_400);
    expect(numbersIn(many)).toBe(2_400_000);
    expect(numbersIn(listedOnly(many))).toBe(6_000);
    const list = (shown: ReadingDocument[]) =>
      renderToStaticMarkup(createElement(ReadingList, { readings: shown, axes: axes(2_400), links }));
    expect(list(listedOnly(many.slice(0, 3)))).toBe(list(many.slice(0, 3)));
  });

  test("fewer are listed the more readings there are; the draws of those that are listed are their own", () => {
    const many = renderToStaticMarkup(
      createElement(ReadingList, { readings: readings(1_000, 2_000), axes: axes(2_000), links }),
    );
    expect(rowsIn(many)).toBe(6);
    const drawn = renderToStaticMarkup(
      createElement(ReportReadings, { readings: readings(1, 1_000, 1), axes: axes(1_000), draws: 1 }),
    );
    expect(drawn).toContain(`>${formatQuantity(1_499, "V", 6)}<`);
    expect(drawn).not.toContain(`>${formatQuantity(1_500, "V", 6)}<`);
  });
});
