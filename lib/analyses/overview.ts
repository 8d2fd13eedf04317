import { OUTCOMES } from "@/lib/solver/outcome";
import { encodeColumns } from "./columns-document";
import { judge } from "./judge";
import { rowLength } from "./plan";
import type { Columns, Contract } from "./rows";

/** A run of fewer numbers is sent whole with its page, and needs none. */
const FEWEST = 20_000;
/** Numbers that an overview may hold. */
const MOST = 120_000;
/** Parts that a sweep is cut into, at first and at least: about two a pixel of a plot, or what is left of that. */
const MOST_PARTS = 1024;
const FEWEST_PARTS = 128;

/**
 * What a large run looks like from afar, in the binary form of columns-document.ts: of the nominal design the points at which a trace is
 * lowest or highest within a part of the sweep, where parts begin and end, and where traces break off. Drawn, it cannot be told from
 * the whole at the width of a page. Its traces are those of the plan, then the readings per point. Null for a run that is small, or of
 * several operating points, or whose curves are too restless to be told by few points.
 */
export function overviewOf(contract: Contract, columns: Columns): Uint8Array<ArrayBuffer> | null {
  const { plan } = contract;
  const length = rowLength(plan);
  const settings = plan.points / (plan.draws + 1) / length;
  if (plan.axes.length === 0 || plan.seek !== undefined) return null;
  if (plan.points * (plan.traces.length + 3) <= FEWEST) return null;
  const read = readAt(contract, columns);
  const curves = [...columns.traces, ...read.map(({ values }) => values)];
  const places = placesOf(curves, length, settings, MOST / (settings * (curves.length + 2)));
  if (places === null) return null;
  const picked = (column: Float64Array) => pick(column, places, length, settings);
  const traces = curves.map(picked);
  const [first, ...outer] = plan.axes;
  const solved = OUTCOMES.indexOf("converged");
  const none = new Float64Array(settings * places.length).fill(Number.NaN);
  return joined(
    encodeColumns({
      plan: {
        ...plan,
        axes: [{ ...first!, values: Array.from(places, (place) => first!.values[place]!) }, ...outer],
        draws: 0,
        points: none.length,
        traces: [...plan.traces, ...read.map(({ name, unit }) => ({ name, unit }))],
        unknowns: [],
      },
      design: null,
      text: "",
      traces,
      outcome: none.map((_, k) => (traces.some((column) => isKnown(column[k]!)) ? solved : Number.NaN)),
      iterations: none,
      rung: none,
      bound: none,
      failures: [],
      diagnostics: [],
    }),
  );
}

/** The readings that are curves themselves, over the nominal design. */
function readAt(contract: Contract, columns: Columns) {
  if (contract.design.reads.length === 0) return [];
  const { readings } = judge(contract, columns);
  return readings
    .filter(({ per }) => per === "point")
    .map(({ name, unit, values }) => ({
      name,
      unit,
      values: Float64Array.from(values, (value) => value ?? Number.NaN),
    }));
}

/** The places along the first axis that are kept, ascending: as many parts as lead to no more than `most` of them; null where none does. */
function placesOf(
  curves: readonly Float64Array[],
  length: number,
  settings: number,
  most: number,
): Int32Array | null {
  if (length <= Math.min(most, 2 * MOST_PARTS)) return Int32Array.from({ length }, (_, place) => place);
  for (let parts = MOST_PARTS; parts >= FEWEST_PARTS; parts /= 2) {
    const kept = new Uint8Array(length);
    for (const column of curves) {
      for (let setting = 0; setting < settings; setting++) mark(kept, column, setting * length, parts);
    }
    const count = kept.reduce((sum, one) => sum + one, 0);
    if (count > most) continue;
    const places = new Int32Array(count);
    for (let place = 0, k = 0; place < length; place++) if (kept[place] === 1) places[k++] = place;
    return places;
  }
  return null;
}

/** Marks the places of one row of a column, which begins at `from`. */
function mark(kept: Uint8Array, column: Float64Array, from: number, parts: number): void {
  const { length } = kept;
  for (let part = 0; part < parts; part++) {
    const begin = Math.floor((part * length) / parts);
    const end = Math.floor(((part + 1) * length) / parts);
    let low = begin;
    let high = begin;
    for (let place = begin; place < end; place++) {
      const value = column[from + place]!;
      const known = isKnown(value);
      if (place > 0 && known !== isKnown(column[from + place - 1]!)) {
        kept[place - 1] = 1;
        kept[place] = 1;
      }
      if (!known) continue;
      if (!(value >= column[from + low]!)) low = place;
      if (!(value <= column[from + high]!)) high = place;
    }
    kept[low] = 1;
    kept[high] = 1;
  }
  kept[length - 1] = 1;
}

function isKnown(value: number): boolean {
  return value - value === 0;
}

function pick(column: Float64Array, places: Int32Array, length: number, settings: number): Float64Array {
  const picked = new Float64Array(settings * places.length);
  for (let setting = 0, k = 0; setting < settings; setting++) {
    for (const place of places) picked[k++] = column[setting * length + place] ?? Number.NaN;
  }
  return picked;
}

function joined(pieces: readonly Uint8Array[]): Uint8Array<ArrayBuffer> {
  const all = new Uint8Array(pieces.reduce((sum, { length }) => sum + length, 0));
  let at = 0;
  for (const piece of pieces) {
    all.set(piece, at);
    at += piece.length;
  }
  return all;
}
