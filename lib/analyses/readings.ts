import type { Reading } from "@/lib/language/ast";
import { Ranks } from "@/lib/language/rank";
import { unitOf } from "@/lib/units/quantity";
import type { ReadingDocument } from "./result";
import type { Contract, Rows } from "./rows";

/** Works out every reading of a run, each using only those before it, and leaves them in `rows` for the requirements. */
export function readAll({ design }: Contract, rows: Rows): ReadingDocument[] {
  const ranks = new Ranks(design.sweeps, design.lets);
  return design.reads.map((reading) => {
    const isTrace = ranks.of(reading.value) === "point" && rows.select(reading.windows).places.length > 1;
    ranks.setReading(reading.name, isTrace ? "point" : "sweep");
    const values = isTrace ? readTrace(reading, rows) : readNumbers(reading, rows);
    rows.readings.set(reading.name, { isTrace, values });
    return {
      name: reading.name,
      unit: unitOf(reading.value.dimension),
      per: isTrace ? "point" : "sweep",
      values: Array.from(values, (value) => (Number.isFinite(value) ? value : null)),
    };
  });
}

function readNumbers({ value, windows }: Reading, rows: Rows): Float64Array {
  const values = new Float64Array(rows.count).fill(Number.NaN);
  const selection = rows.select(windows);
  for (let row = 0; row < rows.count; row++) {
    if (rows.isWithin(row, windows)) values[row] = rows.number(value, row, selection);
  }
  return values;
}

function readTrace({ value, windows }: Reading, rows: Rows): Float64Array {
  const values = new Float64Array(rows.count * rows.length).fill(Number.NaN);
  const selection = rows.select(windows);
  for (let row = 0; row < rows.count; row++) {
    if (!rows.isWithin(row, windows)) continue;
    const trace = rows.trace(value, row, selection);
    selection.places.forEach((place, i) => {
      values[row * rows.length + place] = trace[i]!;
    });
  }
  return values;
}
