import { randomBytes } from "node:crypto";
import { setTimeout } from "node:timers/promises";
import { Client } from "pg";
import { afterAll, beforeAll } from "vitest";
import { closeDatabase } from "@/db/client";
import { migrate } from "@/db/migrate";
import { closeQueue } from "@/lib/queue/producer";

/**
 * Gives the test file an empty, migrated database of its own beside the one of TEST_DATABASE_URL, so that no worker of another
 * file takes its runs. DATABASE_URL names it while the file's tests run; afterwards it is dropped.
 */
export function ownDatabase({ migrated = true } = {}): void {
  const given = process.env.TEST_DATABASE_URL ?? "";
  const name = `own_${randomBytes(6).toString("hex")}`;
  beforeAll(async () => {
    await onServer(given, `CREATE DATABASE ${name}`);
    const url = new URL(given);
    url.pathname = `/${name}`;
    process.env.DATABASE_URL = url.href;
    if (migrated) await migrate(url.href);
  });
  afterAll(async () => {
    await Promise.all([closeQueue(), closeDatabase()]);
    process.env.DATABASE_URL = given;
    await drop(given, name);
  });
}

/** Dropped once the server has noticed that its connections are closed, or by force after a second. */
async function drop(url: string, name: string): Promise<void> {
  for (let tries = 0; tries < 20; tries++) {
    try {
      return await onServer(url, `DROP DATABASE ${name}`);
    } catch {
      await setTimeout(50);
    }
  }
  await onServer(url, `DROP DATABASE ${name} WITH (FORCE)`);
}

async function onServer(url: string, statement: string): Promise<void> {
  const client = new Client({ connectionString: url });
  await client.connect();
  try {
    await client.query(statement);
  } finally {
    await client.end();
  }
}
