import type { Plan } from "./plan";

/** Points that one strand has at most. */
const STRAND_POINTS = 256;
/** Points that a shard has at most, unless one strand alone had more. */
const SHARD_POINTS = 4096;

/** Flat points [from, to). */
export interface PointRange {
  readonly from: number;
  readonly to: number;
}

/**
 * The strand that holds a flat point: neighbours along the first axis, of which the first is solved from a cold start and each
 * other from the one before it. A point's value depends on its strand only, so any sharding gives the same bytes. A long axis
 * is cut evenly.
 */
export function strandAt(plan: Plan, point: number): PointRange {
  const length = plan.axes[0]?.values.length ?? 1;
  const pieces = Math.ceil(length / STRAND_POINTS);
  const row = point - (point % length);
  let piece = Math.floor(((point - row) * pieces) / length);
  while (cut(piece + 1, pieces, length) <= point - row) piece++;
  return { from: row + cut(piece, pieces, length), to: row + cut(piece + 1, pieces, length) };
}

function cut(piece: number, pieces: number, length: number): number {
  return Math.floor((piece * length) / pieces);
}

/** The plan cut at the ends of strands. The first shard is one strand, so that a first curve comes early. */
export function shardsOf(plan: Plan): readonly PointRange[] {
  const shards = [strandAt(plan, 0)];
  let from = shards[0]!.to;
  for (let at = from; at < plan.points; ) {
    const { to } = strandAt(plan, at);
    if (to - from > SHARD_POINTS) {
      shards.push({ from, to: at });
      from = at;
    }
    at = to;
  }
  if (from < plan.points) shards.push({ from, to: plan.points });
  return shards;
}
