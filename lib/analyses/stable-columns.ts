import type { BranchDocument, BranchesDocument } from "./branches-document";
import { type Plan, rowLength } from "./plan";
import type { Columns } from "./rows";
import type { PointRange } from "./strands";
import { withPoint } from "./unstable";

/** The columns of other stable operating points than those that a sweep follows, and which branch each row takes (null: none of its own). */
export interface OtherColumns extends Columns {
  readonly branchOf: readonly (number | null)[];
}

/** Where a circuit may rest, as columns that a contract can be judged on. */
export interface StableColumns {
  /** What the sweep follows, with a stable operating point wherever that is not one and one is known. */
  readonly followed: Columns;
  /** Flat nominal points at which the sweep follows an operating point that is not stable. */
  readonly unstable: readonly PointRange[];
  /** Nominal: each stable branch that the sweep leaves aside, as far as it reaches, and what is followed elsewhere. */
  readonly others: readonly OtherColumns[];
}

/** Sets the columns of a run beside the branches of its rows; a row without any stays as it is. */
export function stableColumns(
  plan: Plan,
  { traces }: Columns,
  branches: readonly (BranchesDocument | null)[],
): StableColumns {
  const length = rowLength(plan);
  const followed = traces.map((trace) => trace.slice());
  const unstable: PointRange[] = [];
  const aside: { row: number; branch: number; of: BranchDocument }[] = [];
  for (const [row, found] of branches.entries()) {
    const left = new Set<number>();
    for (let place = 0; place < length; place++) {
      const point = row * length + place;
      const here = presentAt(found?.branches ?? [], place);
      const on = nearest(here, traces, point, place);
      if (on === null) continue;
      const stable = here.filter(({ of }) => of.stable[place] === true);
      const rest = stable.includes(on) ? on : stable[0];
      if (rest !== on) withPoint(unstable, point);
      if (rest !== on && rest !== undefined) put(followed, point, rest.of, place);
      for (const one of stable) if (one !== rest) left.add(one.branch);
    }
    for (const branch of left) aside.push({ row, branch, of: found!.branches[branch]! });
  }
  return { followed: { traces: followed }, unstable, others: sets(plan, followed, aside) };
}

interface Present {
  readonly branch: number;
  readonly of: BranchDocument;
}

function presentAt(branches: readonly BranchDocument[], place: number): Present[] {
  return branches.flatMap((of, branch) => (of.stable[place] === null ? [] : [{ branch, of }]));
}

/** The branch whose traces are nearest to a solved point, in parts of what the branches span there; a stable one of several alike. */
function nearest(
  here: readonly Present[],
  traces: readonly Float64Array[],
  point: number,
  place: number,
): Present | null {
  let best: Present | null = null;
  let least = Number.POSITIVE_INFINITY;
  const spans = traces.map((_, k) => span(here.map(({ of }) => of.traces[k]!.values[place])));
  for (const one of here) {
    const far = traces.reduce((most, trace, k) => {
      const apart = Math.abs(trace[point]! - (one.of.traces[k]!.values[place] ?? Number.NaN));
      return spans[k]! > 0 ? Math.max(most, apart / spans[k]!) : most;
    }, 0);
    if (far < least || (far === least && best?.of.stable[place] !== true)) [best, least] = [one, far];
  }
  return best;
}

function span(values: readonly (number | null | undefined)[]): number {
  const known = values.filter((value) => typeof value === "number");
  return Math.max(...known) - Math.min(...known);
}

function put(columns: readonly Float64Array[], point: number, of: BranchDocument, place: number): void {
  for (const [k, column] of columns.entries()) column[point] = of.traces[k]!.values[place] ?? Number.NaN;
}

/** As many sets of columns as a row has branches aside; the first of each row together, the second together, and so on. */
function sets(
  plan: Plan,
  followed: readonly Float64Array[],
  aside: readonly { row: number; branch: number; of: BranchDocument }[],
): OtherColumns[] {
  const length = rowLength(plan);
  const nominal = plan.points / (plan.draws + 1);
  const made: { traces: Float64Array[]; branchOf: (number | null)[] }[] = [];
  for (const { row, branch, of } of aside) {
    let set = made.find(({ branchOf }) => branchOf[row] === null);
    if (set === undefined) {
      const rows = nominal / length;
      set = {
        traces: followed.map((trace) => trace.slice(0, nominal)),
        branchOf: new Array(rows).fill(null),
      };
      made.push(set);
    }
    set.branchOf[row] = branch;
    for (let place = 0; place < length; place++) {
      if (of.stable[place] === true) put(set.traces, row * length + place, of, place);
    }
  }
  return made;
}
