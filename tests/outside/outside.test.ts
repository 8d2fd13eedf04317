import { describe, expect, test } from "vitest";
import { BANDGAP } from "./bandgap";
import type { OutsideCase } from "./case";
import { CONSTANTS } from "./constants";
import { DIODE_TABLE, DIODES } from "./diodes";
import { EARLY } from "./early";
import { JUNCTION_TEMPERATURE } from "./junction-temperature";
import { ANTILOG_CONVERTERS, ANTILOG_TABLE, LOG_CONVERTERS, LOG_TABLE } from "./log-converters";
import { MIRRORS } from "./mirrors";
import { ONE_QUADRANT } from "./one-quadrant";
import { PAIRS } from "./pairs";
import { SATURATION } from "./saturation";
import { SOLAR_CELLS, SOLAR_TABLE } from "./solar-cells";
import { misses, solveText } from "./solve";
import { TEXTBOOK_TABLE } from "./textbook";
import { TEXTBOOK_DIODES } from "./textbook-diodes";
import { THERMOMETER } from "./thermometer";
import { WIDLAR } from "./widlar";

/** Every table of tests/reference with the ids of its records and the netlists that cover them. */
const TABLES: readonly (readonly [string, readonly string[], readonly OutsideCase[]])[] = [
  ["constants", ["constants"], CONSTANTS],
  ["diode with resistor", DIODE_TABLE.map(({ id }) => id), DIODES],
  ["log converters", LOG_TABLE.map(({ id }) => id), LOG_CONVERTERS],
  ["junction over temperature", ["temperature"], JUNCTION_TEMPERATURE],
  ["solar cells", SOLAR_TABLE, SOLAR_CELLS],
  ["silicon thermometer", ["TH1"], THERMOMETER],
  ["antilog converters", ANTILOG_TABLE.map(({ id }) => id), ANTILOG_CONVERTERS],
  [
    "textbook circuits",
    TEXTBOOK_TABLE.map(({ id }) => id),
    [
      ...TEXTBOOK_DIODES,
      ...WIDLAR,
      ...MIRRORS,
      ...PAIRS,
      ...ONE_QUADRANT,
      ...SATURATION,
      ...BANDGAP,
      ...EARLY,
    ],
  ],
];

describe.each(TABLES)("%s", (_, ids, cases) => {
  test.each(cases)("$id ($source)", ({ text, derive, expected }) => {
    const traces = solveText(text);
    expect(misses(derive?.(traces) ?? traces, expected)).toEqual([]);
  });

  test("no record of the table is left out", () => {
    expect(new Set(cases.map(({ id }) => id))).toEqual(new Set(ids));
  });
});
