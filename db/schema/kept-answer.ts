import { index, integer, jsonb, pgTable, primaryKey, text, timestamp, uuid } from "drizzle-orm/pg-core";
import { user } from "./user";

/** What a request with an Idempotency-Key came to, so that the same request again makes nothing twice. Kept for a day. */
export const keptAnswer = pgTable(
  "kept_answer",
  {
    userId: uuid("user_id")
      .notNull()
      .references(() => user.id),
    key: text().notNull(),
    /** SHA-256 of the request's method, path and body, 64 hexadecimal digits. */
    request: text().notNull(),
    /** HTTP status; null while the request is being worked on. */
    status: integer(),
    body: jsonb().$type<unknown>(),
    createdAt: timestamp("created_at", { withTimezone: true }).notNull().defaultNow(),
  },
  (table) => [
    primaryKey({ columns: [table.userId, table.key] }),
    index("kept_answer_age").on(table.createdAt),
  ],
);
