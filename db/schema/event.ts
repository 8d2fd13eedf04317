import { integer, jsonb, pgEnum, pgTable, primaryKey, timestamp, uuid } from "drizzle-orm/pg-core";
import { run } from "./run";

export const eventKind = pgEnum("event_kind", ["progress", "status"]);

/** Sweeps of the first knob in which several operating points are looked for, and how many of them are done. */
export interface SearchProgress {
  readonly rows: number;
  readonly rowsDone: number;
}

/** The state of a run just after the event. */
export interface EventData {
  readonly status: "queued" | "running" | "done" | "failed" | "cancelled";
  readonly points: number;
  readonly pointsDone: number;
  readonly pointsFailed: number;
  /** How far the search for several operating points is; absent where the text does not ask for them. */
  readonly search?: SearchProgress;
}

/** What happened to a run, numbered from 1 without gaps, so that a reader can go on where it stopped. */
export const event = pgTable(
  "event",
  {
    runId: uuid("run_id")
      .notNull()
      .references(() => run.id),
    sequence: integer().notNull(),
    kind: eventKind().notNull(),
    data: jsonb().$type<EventData>().notNull(),
    at: timestamp({ withTimezone: true }).notNull().defaultNow(),
  },
  (table) => [primaryKey({ columns: [table.runId, table.sequence] })],
);
