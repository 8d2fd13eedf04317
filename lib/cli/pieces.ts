import type { Plan } from "@/lib/analyses/plan";
import { strandAt } from "@/lib/analyses/strands";
import type { Piece } from "./thread-messages";

/** Pieces per thread aimed at, so that a thread with easy points takes over from one with hard ones. */
const PIECES_A_THREAD = 4;
/** Points of a piece at most, unless one strand alone has more. */
const PIECE_POINTS = 4096;

/** The plan cut at the ends of strands, which are solved whole. */
export function piecesOf(plan: Plan, threads: number): Piece[] {
  const aim = Math.min(PIECE_POINTS, Math.ceil(plan.points / (threads * PIECES_A_THREAD)));
  const pieces: Piece[] = [];
  for (let from = 0; from < plan.points; ) {
    let { to } = strandAt(plan, from);
    while (to < plan.points && to - from < aim) to = strandAt(plan, to).to;
    pieces.push({ from, to });
    from = to;
  }
  return pieces;
}
