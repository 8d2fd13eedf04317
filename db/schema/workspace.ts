import { sql } from "drizzle-orm";
import { check, integer, pgTable, text, timestamp, uuid } from "drizzle-orm/pg-core";

/** A team's room: everything else belongs to exactly one. */
export const workspace = pgTable(
  "workspace",
  {
    id: uuid().primaryKey().defaultRandom(),
    slug: text().notNull().unique(),
    name: text().notNull(),
    /** The numbers given out last. They are raised by an update of this row, so concurrent takers wait for one another. */
    lastNetlistNumber: integer("last_netlist_number").notNull().default(0),
    lastRunNumber: integer("last_run_number").notNull().default(0),
    createdAt: timestamp("created_at", { withTimezone: true }).notNull().defaultNow(),
  },
  (table) => [check("workspace_slug_form", sql`${table.slug} ~ '^[a-z0-9]+(-[a-z0-9]+)*$'`)],
);
