import { index, pgEnum, pgTable, primaryKey, timestamp, uuid } from "drizzle-orm/pg-core";
import { user } from "./user";
import { workspace } from "./workspace";

export const role = pgEnum("role", ["viewer", "engineer", "reviewer", "admin"]);

/** Who belongs to which workspace, and as what. Read at every request, so a change holds at once. */
export const membership = pgTable(
  "membership",
  {
    workspaceId: uuid("workspace_id")
      .notNull()
      .references(() => workspace.id),
    userId: uuid("user_id")
      .notNull()
      .references(() => user.id),
    role: role().notNull(),
    createdAt: timestamp("created_at", { withTimezone: true }).notNull().defaultNow(),
  },
  (table) => [
    primaryKey({ columns: [table.workspaceId, table.userId] }),
    index("membership_user").on(table.userId),
  ],
);
