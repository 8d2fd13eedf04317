import type { BranchDocument, BranchesDocument } from "@/lib/analyses/branches-document";
import { type CurveSet, outerIndices } from "./curve-set";

/** A piece of a branch that is stable all along, or all along not; its ends are at folds where it goes over into another. */
export interface BranchPiece {
  readonly isStable: boolean;
  /** Values of the first knob, ascending, coherent SI units. */
  readonly x: Float64Array;
  readonly values: Float64Array;
}

export interface FoldPoint {
  readonly x: number;
  readonly value: number;
}

export interface BranchLines {
  readonly pieces: readonly BranchPiece[];
  readonly folds: readonly FoldPoint[];
}

interface Point {
  readonly x: number;
  readonly value: number;
  readonly isStable: boolean;
}

/** A branch in the order of `x`, and the folds that it reaches at either end. */
interface Reach {
  readonly points: readonly Point[];
  before: FoldPoint | null;
  after: FoldPoint | null;
}

/** The branches of a trace at one setting; null where the run was not asked for several operating points. */
export function branchLines(set: CurveSet, trace: string, family: number): BranchLines | null {
  const row = set.source.branches?.find((one) => isAt(set, one, family));
  const shown = set.source.traces.findIndex(({ name }) => name === trace);
  if (row === undefined || shown === -1) return null;
  const reaches = row.branches.map((branch) => reachOf(set, branch, trace));
  const folds = row.folds.flatMap(({ value: x, traces }) => {
    const value = traces[shown] ?? null;
    return value === null ? [] : [{ x, value }];
  });
  for (const fold of folds) join(set, reaches, fold);
  return { pieces: reaches.flatMap(piecesOf), folds };
}

function isAt({ outer }: CurveSet, { at }: BranchesDocument, family: number): boolean {
  const indices = outerIndices(outer, family);
  return at.every(({ knob, value }) => {
    const axis = outer.findIndex((one) => one.knob === knob);
    return axis !== -1 && outer[axis]!.values[indices[axis]!] === value;
  });
}

function reachOf(set: CurveSet, { stable, traces }: BranchDocument, trace: string): Reach {
  const values = traces.find(({ name }) => name === trace)?.values ?? [];
  const points = Array.from(set.order).flatMap((index, place) => {
    const value = values[index] ?? null;
    return value === null ? [] : [{ x: set.x[place]!, value, isStable: stable[index] ?? false }];
  });
  return { points, before: null, after: null };
}

/** Lets the two branches that come nearest to a fold, between its neighbours on the axis, meet there. */
function join({ x }: CurveSet, reaches: readonly Reach[], fold: FoldPoint): void {
  const next = x.findIndex((value) => value > fold.x);
  const [low, high] = [next === -1 ? x.at(-1) : x[next - 1], next === -1 ? undefined : x[next]];
  const ends = reaches.flatMap((reach) => {
    const [first, last] = [reach.points[0], reach.points.at(-1)];
    return [
      ...(last !== undefined && last.x === low && reach.after === null
        ? [{ reach, at: last, side: "after" as const }]
        : []),
      ...(first !== undefined && first.x === high && reach.before === null
        ? [{ reach, at: first, side: "before" as const }]
        : []),
    ];
  });
  const nearest = ends.sort((a, b) => Math.abs(a.at.value - fold.value) - Math.abs(b.at.value - fold.value));
  const side = nearest[0]?.side;
  for (const end of nearest.filter((one) => one.side === side).slice(0, 2)) end.reach[end.side] = fold;
}

function piecesOf({ points, before, after }: Reach): BranchPiece[] {
  const [first, last] = [points[0], points.at(-1)];
  if (first === undefined || last === undefined) return [];
  const all = [
    ...(before === null ? [] : [{ ...before, isStable: first.isStable }]),
    ...points,
    ...(after === null ? [] : [{ ...after, isStable: last.isStable }]),
  ];
  const pieces: Point[][] = [];
  for (const point of all) {
    const piece = pieces.at(-1);
    if (piece === undefined) pieces.push([point]);
    else if (piece.at(-1)!.isStable === point.isStable) piece.push(point);
    else pieces.push([piece.at(-1)!, point]);
  }
  // The step over from one to the other belongs to what it leads to; a first point alone is a piece too.
  return pieces.map((piece) => ({
    isStable: piece.at(-1)!.isStable,
    x: Float64Array.from(piece, ({ x }) => x),
    values: Float64Array.from(piece, ({ value }) => value),
  }));
}
