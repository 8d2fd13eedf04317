import type { Box, Joint } from "@/lib/language/symbols/connections";
import { type Line, netsOf } from "./rail-order";

/** A chip before lengths are known. Rails are numbered from 0; gap `g` lies left of rail `g`. */
export interface Placed {
  readonly box: Box;
  readonly gap: number;
  readonly left: readonly Joint[];
  readonly right: readonly Joint[];
}

/** Chips that stand side by side, in their order from left to right. */
export interface PlacedRow {
  readonly kind: "row";
  readonly chips: readonly Placed[];
}

export type PlacedLine = PlacedRow | Exclude<Line, { readonly kind: "row" }>;

/**
 * Gives each box its gap and its pins their sides, and each chip a row. Where the next box stands to the right of all that is on a
 * row, it joins them, so that a path is a row, and so are branches that lie side by side.
 */
export function placeChips(lines: readonly Line[], rails: ReadonlyMap<string, number>): PlacedLine[] {
  const placed: PlacedLine[] = [];
  let row: { chips: Placed[]; right: number } | null = null;
  for (const line of lines) {
    if (line.kind !== "row") {
      placed.push(line);
      row = null;
      continue;
    }
    for (const box of line.boxes) {
      const chip = placeChip(box, rails);
      const [from, to] = reach(chip, rails);
      // Two chips may meet at a rail, which is the net between them, but not in a gap.
      const meets = row !== null && from === row.right && from % 2 === 1;
      if (row === null || (from <= row.right && !meets)) {
        row = { chips: [], right: to };
        placed.push({ kind: "row", chips: row.chips });
      }
      row.chips.push(chip);
      row.right = to;
    }
  }
  return placed;
}

function placeChip(box: Box, rails: ReadonlyMap<string, number>): Placed {
  const at = netsOf(box)
    .map((net) => rails.get(net)!)
    .sort((a, b) => a - b);
  const gap = gapOf(box, at);
  const left: Joint[] = [];
  const right: Joint[] = [];
  const free: { joint: Joint; index: number }[] = [];
  box.joints.forEach((joint, index) => {
    const rail = joint.net === null ? undefined : rails.get(joint.net);
    if (rail === undefined) free.push({ joint, index });
    else if (rail < gap) left.push(joint);
    else right.push(joint);
  });
  // What ends at the chip, on ground or open, keeps the side the text gives it, or takes the emptier one.
  for (const { joint, index } of free) {
    const isPath = box.joints.length === 2;
    const isLeft = isPath && at.length === 0 ? index === 0 : left.length <= right.length;
    (isLeft ? left : right).push(joint);
  }
  return { box, gap, left, right };
}

/** Between the rails of a chip where it has several; beside its only one, on the side on which the text has it. */
function gapOf({ joints }: Box, rails: readonly number[]): number {
  if (rails.length === 0) return 0;
  if (rails.length > 1) return rails[(rails.length - 1) >> 1]! + 1;
  const isEnd = joints.length === 2 && (joints[0]!.net === null || joints[0]!.net === "ground");
  return isEnd ? rails[0]! : rails[0]! + 1;
}

/** From where to where a chip and its wires reach: rail `i` is at 2i + 1, gap `g` at 2g. */
function reach(
  { box, gap }: Pick<Placed, "box" | "gap">,
  rails: ReadonlyMap<string, number>,
): readonly [number, number] {
  const at = netsOf(box).map((net) => 2 * rails.get(net)! + 1);
  return [Math.min(2 * gap, ...at), Math.max(2 * gap, ...at)];
}
