import { z } from "zod";

/** The one queue: each job names a shard to compute and carries nothing else, for the tables are the truth. */
export const SHARD_QUEUE = "shards";

export const shardJob = z.object({ runId: z.uuid(), index: z.number().int().nonnegative() });
export type ShardJob = z.infer<typeof shardJob>;

/** The id of a shard's job. While the queue still holds one, adding it again does nothing. */
export function jobId({ runId, index }: ShardJob): string {
  return `${runId}-${index}`;
}
