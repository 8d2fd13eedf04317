import { sql } from "drizzle-orm";
import {
  foreignKey,
  index,
  integer,
  jsonb,
  pgEnum,
  pgTable,
  text,
  timestamp,
  unique,
  uuid,
} from "drizzle-orm/pg-core";
import type { Plan } from "@/lib/analyses/plan";
import type { KeptJudgement } from "@/lib/analyses/verdict";
import { netlist } from "./netlist";
import { revision } from "./revision";
import { user } from "./user";
import { workspace } from "./workspace";

export const runStatus = pgEnum("run_status", ["queued", "running", "done", "failed", "cancelled"]);
export const runVerdict = pgEnum("run_verdict", ["holds", "broken", "no data"]);

/** Which points of a run its small curve shows: at most 64 along the first axis, in ascending order of `x` from 0 to 1. */
export interface Preview {
  readonly points: readonly number[];
  readonly x: readonly number[];
  /** Decades that a logarithmic axis spans; 0 for another. */
  readonly decades: number;
}

/** One solving of one revision. This row is the truth about it; queue jobs only carry its id. */
export const run = pgTable(
  "run",
  {
    id: uuid().primaryKey().defaultRandom(),
    workspaceId: uuid("workspace_id")
      .notNull()
      .references(() => workspace.id),
    number: integer().notNull(),
    netlistId: uuid("netlist_id")
      .notNull()
      .references(() => netlist.id),
    revisionNumber: integer("revision_number").notNull(),
    /** The title in the revision's text, or the netlist's where it has none. */
    title: text().notNull(),
    status: runStatus().notNull().default("queued"),
    plan: jsonb().$type<Plan>().notNull(),
    /** Null where there is no curve to draw. Kept apart from the plan, which may hold a million values. */
    preview: jsonb().$type<Preview>(),
    points: integer().notNull(),
    pointsDone: integer("points_done").notNull().default(0),
    pointsFailed: integer("points_failed").notNull().default(0),
    shardsLeft: integer("shards_left").notNull(),
    /** Sweeps of the first knob in which several operating points are looked for; 0 where the text does not ask for them. */
    rowsSought: integer("rows_sought").notNull().default(0),
    rowsDone: integer("rows_done").notNull().default(0),
    /** Sequence of the newest event; raised with each one added. */
    lastEvent: integer("last_event").notNull().default(0),
    queuedAt: timestamp("queued_at", { withTimezone: true }).notNull().defaultNow(),
    startedAt: timestamp("started_at", { withTimezone: true }),
    finishedAt: timestamp("finished_at", { withTimezone: true }),
    /** One sentence why the whole run could not be computed; null otherwise. */
    error: text(),
    /** Of the requirements; null before they are judged and where there are none. */
    verdict: runVerdict(),
    /** Readings, requirements with margins, error budgets; null before they are judged. */
    judgement: jsonb().$type<KeptJudgement>(),
    judgedAt: timestamp("judged_at", { withTimezone: true }),
    requestedBy: uuid("requested_by")
      .notNull()
      .references(() => user.id),
    engineVersion: text("engine_version").notNull(),
  },
  (table) => [
    unique("run_number").on(table.workspaceId, table.number),
    index("run_netlist").on(table.netlistId, table.number),
    index("run_status").on(table.status),
    index("run_unjudged").on(table.finishedAt).where(sql`status = 'done' AND judged_at IS NULL`),
    foreignKey({
      name: "run_revision",
      columns: [table.netlistId, table.revisionNumber],
      foreignColumns: [revision.netlistId, revision.number],
    }),
  ],
);
