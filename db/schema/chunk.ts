import { doublePrecision, foreignKey, integer, pgTable, primaryKey, text, uuid } from "drizzle-orm/pg-core";
import { bytea } from "./bytea";
import { shard } from "./shard";

/**
 * At most 4096 neighbouring values of one column of one shard. `column` is "trace/0", "unknown/0", …, "outcome",
 * "iterations", "residual" or "rung", or for branches one of branch-columns.ts. `data` is byte-shuffled little-endian Float64, compressed by PostgreSQL with lz4.
 * `minimum` and `maximum` are over the numbers among the values, null where there is none.
 */
export const chunk = pgTable(
  "chunk",
  {
    runId: uuid("run_id").notNull(),
    shardIndex: integer("shard_index").notNull(),
    column: text("column_name").notNull(),
    index: integer().notNull(),
    count: integer().notNull(),
    minimum: doublePrecision(),
    maximum: doublePrecision(),
    data: bytea().notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.runId, table.column, table.shardIndex, table.index] }),
    foreignKey({
      name: "chunk_shard",
      columns: [table.runId, table.shardIndex],
      foreignColumns: [shard.runId, shard.index],
    }),
  ],
);
