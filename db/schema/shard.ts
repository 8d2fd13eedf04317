import {
  index,
  integer,
  jsonb,
  pgEnum,
  pgTable,
  primaryKey,
  text,
  timestamp,
  uuid,
} from "drizzle-orm/pg-core";
import type { Failure } from "@/lib/analyses/result";
import type { PointRange } from "@/lib/analyses/strands";
import { run } from "./run";

/** What is kept of one sweep of the first knob in which operating points were looked for, beside its chunks. */
export interface FoundRow {
  /** Whether the indices of what was found add up everywhere. */
  readonly complete: boolean;
  readonly branches: number;
  readonly folds: number;
  /** One sentence why nothing was found, where the search was broken off. */
  readonly fault?: string;
}

/** Points to solve, or the operating points of one sweep of the first knob to look for. */
export const shardKind = pgEnum("shard_kind", ["points", "branches"]);
export const shardStatus = pgEnum("shard_status", ["queued", "running", "done"]);

/** The flat points [from, to) of a run, computed by one job. Whoever holds the lease may write its results, once. */
export const shard = pgTable(
  "shard",
  {
    runId: uuid("run_id")
      .notNull()
      .references(() => run.id),
    index: integer().notNull(),
    kind: shardKind().notNull().default("points"),
    from: integer("from_point").notNull(),
    to: integer("to_point").notNull(),
    status: shardStatus().notNull().default("queued"),
    /** Counts claims; a result is taken only from the newest one. */
    attempt: integer().notNull().default(0),
    /** When a job for it was last put on the queue. */
    queuedAt: timestamp("queued_at", { withTimezone: true }).notNull().defaultNow(),
    claimedAt: timestamp("claimed_at", { withTimezone: true }),
    claimedBy: text("claimed_by"),
    leaseUntil: timestamp("lease_until", { withTimezone: true }),
    /** Points solved so far in the present attempt, for progress; not yet stored. */
    pointsUnderWay: integer("points_under_way").notNull().default(0),
    failures: jsonb().$type<readonly Failure[]>().notNull().default([]),
    /** Flat points that are solved and not stable. */
    unstable: jsonb().$type<readonly PointRange[]>().notNull().default([]),
    /** What was found, beside its chunks; null before, and for points. */
    found: jsonb().$type<FoundRow>(),
  },
  (table) => [
    primaryKey({ columns: [table.runId, table.index] }),
    index("shard_status").on(table.status, table.queuedAt),
  ],
);
