import { index, pgTable, text, timestamp, uuid } from "drizzle-orm/pg-core";
import { user } from "./user";

/** One sign-in. The cookie carries only its id; `endedAt` shuts it for every later request. */
export const session = pgTable(
  "session",
  {
    id: uuid().primaryKey().defaultRandom(),
    userId: uuid("user_id")
      .notNull()
      .references(() => user.id),
    createdAt: timestamp("created_at", { withTimezone: true }).notNull().defaultNow(),
    lastSeenAt: timestamp("last_seen_at", { withTimezone: true }).notNull().defaultNow(),
    endedAt: timestamp("ended_at", { withTimezone: true }),
    userAgent: text("user_agent"),
    address: text(),
  },
  (table) => [index("session_user").on(table.userId)],
);
