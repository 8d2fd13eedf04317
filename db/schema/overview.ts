import { pgTable, uuid } from "drizzle-orm/pg-core";
import { bytea } from "./bytea";
import { run } from "./run";

/**
 * What a large run looks like from afar: the points that its curves bend at, few enough to be sent with its page, in the binary form of
 * lib/analyses/columns-document.ts. Written when the run is judged; only runs of many points have one.
 */
export const overview = pgTable("overview", {
  runId: uuid("run_id")
    .primaryKey()
    .references(() => run.id),
  data: bytea().notNull(),
});
