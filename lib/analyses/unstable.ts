import type { Window } from "@/lib/language/ast";
import type { RequirementDocument } from "./result";
import type { Contract, Rows } from "./rows";
import type { PointRange } from "./strands";

const REMARK =
  "In places the sweep follows an operating point that is not stable and that the circuit would leave; `seek 3` would look for others.";

/** Flat points as ranges, with a point more at their end. Points come in order. */
export function withPoint(ranges: PointRange[], point: number): void {
  const last = ranges.at(-1);
  if (last?.to === point) ranges[ranges.length - 1] = { from: last.from, to: point + 1 };
  else ranges.push({ from: point, to: point + 1 });
}

/** Ranges in the order of their points, those that touch made one, so that they do not tell how a run was cut. */
export function joined(ranges: readonly PointRange[]): PointRange[] {
  const all: PointRange[] = [];
  for (const { from, to } of [...ranges].sort((a, b) => a.from - b.from)) {
    const last = all.at(-1);
    if (last?.to === from) all[all.length - 1] = { from: last.from, to };
    else all.push({ from, to });
  }
  return all;
}

/** Whether the windows of a requirement leave any of these points, of whatever draw. */
export function isTouched(ranges: readonly PointRange[], windows: readonly Window[], rows: Rows): boolean {
  const places = rows.select(windows).places;
  for (const { from, to } of ranges) {
    for (let row = Math.floor(from / rows.length); row * rows.length < to; row++) {
      if (row >= rows.count || !rows.isWithin(row, windows)) continue;
      const start = row * rows.length;
      if (places.some((place) => start + place >= from && start + place < to)) return true;
    }
  }
  return false;
}

/** Requirements of a text that does not seek, with a remark where they were judged at points that are not stable. */
export function remarkUnstable(
  { design }: Contract,
  rows: Rows,
  ranges: readonly PointRange[],
  requirements: readonly RequirementDocument[],
): RequirementDocument[] {
  return requirements.map((one, k) =>
    isTouched(ranges, design.requirements[k]!.windows, rows) ? { ...one, remark: REMARK } : one,
  );
}
