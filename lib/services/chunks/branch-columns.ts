import type { FoundRow } from "@/db/schema/shard";
import { type BranchDocument, type BranchesDocument, placeOfRow } from "@/lib/analyses/branches-document";
import { type Plan, rowLength } from "@/lib/analyses/plan";
import { type Chunk, cut } from "./codec";

/** The branches of one row, cut and encoded for the tables. */
export interface StoredRow {
  readonly found: FoundRow;
  readonly columns: readonly { readonly column: string; readonly chunks: readonly Chunk[] }[];
}

const STABLE = "branch/stable";
const BOUND = "branch/bound";
const branchTrace = (k: number) => `branch/trace/${k}`;
const FOLD = "fold/value";
const foldTrace = (k: number) => `fold/trace/${k}`;

/**
 * Columns in which the branches of a row follow one another, each over the whole first axis, and columns of its folds; NaN for null, 1 and 0 for
 * stable and not. Every bit of the document's numbers is kept.
 */
export function storedRow({ complete, branches, folds, fault }: BranchesDocument): StoredRow {
  const found = { complete, branches: branches.length, folds: folds.length };
  const traces = (branches[0]?.traces ?? folds[0]?.traces ?? []).map((_, k) => k);
  const columns: [string, Float64Array][] = [
    [STABLE, join(branches, ({ stable }) => stable.map((one) => (one === null ? null : Number(one))))],
    [BOUND, join(branches, ({ bound }) => bound)],
    ...traces.map((k): [string, Float64Array] => [
      branchTrace(k),
      join(branches, (branch) => branch.traces[k]!.values),
    ]),
    [FOLD, join(folds, ({ value }) => [value])],
    ...traces.map((k): [string, Float64Array] => [foldTrace(k), join(folds, (fold) => [fold.traces[k]!])]),
  ];
  return {
    found: fault === undefined ? found : { ...found, fault },
    columns: columns.map(([column, values]) => ({ column, chunks: cut(values) })),
  };
}

/** The inverse of `storedRow`: the document of a row from its columns, by name. Throws where one is too short. */
export function rowFrom(
  plan: Plan,
  row: number,
  { complete, branches, folds, fault }: FoundRow,
  columns: ReadonlyMap<string, Float64Array>,
): BranchesDocument {
  const length = rowLength(plan);
  const part = (name: string, from: number, to: number): (number | null)[] => {
    const values = columns.get(name)?.subarray(from, to) ?? new Float64Array();
    if (values.length !== to - from) throw new RangeError(`The column ${name} of row ${row} is not whole.`);
    return Array.from(values, (value) => (Number.isNaN(value) ? null : value));
  };
  const branchAt = (b: number): BranchDocument => {
    const [from, to] = [b * length, (b + 1) * length];
    return {
      stable: part(STABLE, from, to).map((one) => (one === null ? null : one === 1)),
      bound: part(BOUND, from, to),
      traces: plan.traces.map(({ name, unit }, k) => ({
        name,
        unit,
        values: part(branchTrace(k), from, to),
      })),
    };
  };
  return {
    at: placeOfRow(plan, row),
    complete,
    branches: Array.from({ length: branches }, (_, b) => branchAt(b)),
    folds: Array.from({ length: folds }, (_, f) => ({
      value: part(FOLD, f, f + 1)[0]!,
      traces: plan.traces.map((_, k) => part(foldTrace(k), f, f + 1)[0]!),
    })),
    ...(fault === undefined ? {} : { fault }),
  };
}

/** Numbers that the document of a row holds. */
export function numbersIn(plan: Plan, { branches, folds }: FoundRow): number {
  return branches * rowLength(plan) * (plan.traces.length + 2) + folds * (plan.traces.length + 1);
}

function join<T>(all: readonly T[], of: (one: T) => readonly (number | null)[]): Float64Array {
  return Float64Array.from(
    all.flatMap((one) => of(one)),
    (value) => value ?? Number.NaN,
  );
}
