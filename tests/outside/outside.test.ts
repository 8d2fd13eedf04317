import { describe, expect, test } from "vitest";
import type { OutsideCase } from "./case";
import { CONSTANTS } from "./constants";
import { DIODE_TABLE, DIODES } from "./diodes";
import { ANTILOG_CONVERTERS, ANTILOG_TABLE, LOG_CONVERTERS, LOG_TABLE } from "./log-converters";
import { misses, solveText } from "./solve";

/** Every table of tests/reference with the ids of its records and the netlists that cover them. */
const TABLES: readonly (readonly [string, readonly string[], readonly OutsideCase[]])[] = [
  ["constants", ["constants"], CONSTANTS],
  ["diode with resistor", DIODE_TABLE.map(({ id }) => id), DIODES],
  ["log converters", LOG_TABLE.map(({ id }) => id), LOG_CONVERTERS],
  ["antilog converters", ANTILOG_TABLE.map(({ id }) => id), ANTILOG_CONVERTERS],
];

describe.each(TABLES)("%s", (_, ids, cases) => {
  test.each(cases)("$id ($source)", ({ text, expected }) => {
    expect(misses(solveText(text), expected)).toEqual([]);
  });

  test("no record of the table is left out", () => {
    expect(new Set(cases.map(({ id }) => id))).toEqual(new Set(ids));
  });
});
