import { sql } from "drizzle-orm";
import { afterAll, beforeAll, expect, test } from "vitest";
import { database } from "@/db/client";
import { type OwnDatabase, ownDatabase } from "./own-database";

let own: OwnDatabase;
beforeAll(async () => {
  own = await ownDatabase();
});
afterAll(() => own.drop());

async function pid(on: Pick<ReturnType<typeof database>, "execute">): Promise<number> {
  const { rows } = await on.execute<{ pid: number }>(sql`SELECT pg_backend_pid() AS pid`);
  return rows[0]!.pid;
}

test("a connection that breaks between two statements of a transaction fails that one alone", async () => {
  const unheard: unknown[] = [];
  const hear = (error: unknown) => unheard.push(error);
  process.on("uncaughtExceptionMonitor", hear);
  try {
    const broken = database().transaction(async (transaction) => {
      const mine = await pid(transaction);
      await database().execute(sql`SELECT pg_terminate_backend(${mine}, 10000)`);
      await new Promise((resolve) => setTimeout(resolve, 100));
      await transaction.execute(sql`SELECT 1`);
    });
    await expect(broken).rejects.toThrow();
    expect(unheard).toEqual([]);
    expect(await pid(database())).toBeGreaterThan(0);
  } finally {
    process.off("uncaughtExceptionMonitor", hear);
  }
});
