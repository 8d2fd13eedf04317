import { randomBytes } from "node:crypto";
import { Client } from "pg";
import { closeDatabase } from "@/db/client";
import { migrate } from "@/db/migrate";
import { closeQueue } from "@/lib/queue/producer";
import { closeListener } from "@/lib/services/events/listen";

export interface OwnDatabase {
  readonly url: string;
  /** Turns everybody out and lets nobody in, or lets them in again. */
  shut(closed: boolean): Promise<void>;
  /** Ends this process's connections and drops the database. */
  drop(): Promise<void>;
}

/**
 * A migrated database of this test file's own, beside the common one: its queue is then its own too, and no other test's worker
 * takes its jobs. DATABASE_URL names it from here on.
 */
export async function ownDatabase(beside = process.env.TEST_DATABASE_URL): Promise<OwnDatabase> {
  if (beside === undefined) throw new Error("TEST_DATABASE_URL says where the PostgreSQL for tests is.");
  const name = `work_${randomBytes(6).toString("hex")}`;
  await command(beside, `CREATE DATABASE ${name}`);
  const there = new URL(beside);
  there.pathname = `/${name}`;
  const url = there.href;
  await migrate(url);
  await disconnect();
  process.env.DATABASE_URL = url;
  return {
    url,
    async shut(closed) {
      await command(beside, `ALTER DATABASE ${name} ALLOW_CONNECTIONS ${!closed}`);
      if (!closed) return;
      const here = `FROM pg_stat_activity WHERE datname = '${name}'`;
      await command(beside, `SELECT pg_terminate_backend(pid, 10000) ${here}`);
    },
    async drop() {
      await disconnect();
      await command(beside, `DROP DATABASE ${name} WITH (FORCE)`);
    },
  };
}

/** Ends what this process holds open: the pool, the listener and the queue. The next use opens it anew. */
export async function disconnect(): Promise<void> {
  await Promise.all([closeQueue(), closeListener(), closeDatabase()]);
}

async function command(url: string, sql: string): Promise<void> {
  const client = new Client({ connectionString: url });
  await client.connect();
  try {
    await client.query(sql);
  } finally {
    await client.end();
  }
}
