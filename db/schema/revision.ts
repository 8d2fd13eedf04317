import { index, integer, pgTable, primaryKey, text, timestamp, uuid } from "drizzle-orm/pg-core";
import { netlist } from "./netlist";
import { user } from "./user";

/** A text that never changes again (a trigger refuses updates and deletes). */
export const revision = pgTable(
  "revision",
  {
    netlistId: uuid("netlist_id")
      .notNull()
      .references(() => netlist.id),
    number: integer().notNull(),
    /** SHA-256 of the canonical text, 64 hexadecimal digits: the identity of the design. */
    hash: text().notNull(),
    text: text().notNull(),
    message: text(),
    authorId: uuid("author_id")
      .notNull()
      .references(() => user.id),
    createdAt: timestamp("created_at", { withTimezone: true }).notNull().defaultNow(),
  },
  (table) => [
    primaryKey({ columns: [table.netlistId, table.number] }),
    index("revision_hash").on(table.netlistId, table.hash),
  ],
);
