import { drizzle, type NodePgDatabase } from "drizzle-orm/node-postgres";
import { Pool } from "pg";
import { env } from "@/lib/env";

export type Database = NodePgDatabase & { $client: Pool };
/** The database, or a transaction on it. */
export type Queryable = Pick<Database, "select" | "insert" | "update" | "delete" | "execute">;

const KEY = Symbol.for("sweepwright.database");
const held = globalThis as { [KEY]?: Database };

/**
 * The database of this process, connected on first use. It is kept on the global object because the server's bundles each have
 * their own copy of this module. A connection that breaks while idle is dropped and the next query opens another one.
 */
export function database(): Database {
  held[KEY] ??= open(env().DATABASE_URL);
  return held[KEY];
}

function open(connectionString: string): Database {
  const pool = new Pool({ connectionString, max: 10, connectionTimeoutMillis: 5_000, keepAlive: true });
  pool.on("error", (error) => console.warn(`A database connection was lost: ${error.message}`));
  // One that breaks within a transaction has nobody else to hear it, and an error unheard would end the process; whatever was
  // asked on it fails by itself.
  pool.on("connect", (client) => client.on("error", () => undefined));
  return drizzle(pool);
}

/** Closes the pool, when the process ends; a later use opens a new one. */
export async function closeDatabase(): Promise<void> {
  const open = held[KEY];
  delete held[KEY];
  await open?.$client.end();
}
