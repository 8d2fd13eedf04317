import { index, integer, pgTable, text, timestamp, unique, uuid } from "drizzle-orm/pg-core";
import { user } from "./user";
import { workspace } from "./workspace";

/** A netlist is a line of revisions under one number; its title follows the newest text. */
export const netlist = pgTable(
  "netlist",
  {
    id: uuid().primaryKey().defaultRandom(),
    workspaceId: uuid("workspace_id")
      .notNull()
      .references(() => workspace.id),
    number: integer().notNull(),
    title: text().notNull(),
    createdBy: uuid("created_by")
      .notNull()
      .references(() => user.id),
    /** Number of the newest revision. Locked while one is added, so that numbers have no gaps. */
    latestRevision: integer("latest_revision").notNull(),
    createdAt: timestamp("created_at", { withTimezone: true }).notNull().defaultNow(),
    updatedAt: timestamp("updated_at", { withTimezone: true }).notNull().defaultNow(),
    archivedAt: timestamp("archived_at", { withTimezone: true }),
  },
  (table) => [
    unique("netlist_number").on(table.workspaceId, table.number),
    index("netlist_updated").on(table.workspaceId, table.updatedAt),
  ],
);
