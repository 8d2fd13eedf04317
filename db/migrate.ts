import { resolve } from "node:path";
import { runMigrations } from "bullmq";
import { drizzle } from "drizzle-orm/node-postgres";
import { migrate as applyMigrations } from "drizzle-orm/node-postgres/migrator";
import { Client } from "pg";

/** Any number of our own: processes that migrate wait for one another on it. */
const LOCK = 7_396_104;

/**
 * Brings the database at `url` up to date: our tables (drizzle/), then the queue's own. Safe to call from several processes at
 * once, and again. `folder` holds the migrations, by default drizzle/ under the current directory.
 */
export async function migrate(url: string, folder = resolve("drizzle")): Promise<void> {
  const client = new Client({ connectionString: url });
  await client.connect();
  try {
    await client.query("SELECT pg_advisory_lock($1)", [LOCK]);
    await applyMigrations(drizzle(client), { migrationsFolder: folder });
    await runMigrations(client);
  } finally {
    await client.end();
  }
}
