import { sql } from "drizzle-orm";
import { database } from "@/db/client";
import { workspace } from "@/db/schema/workspace";
import { AppError } from "@/lib/errors";

/** Throws "unavailable" unless the database answers and has been migrated. It reads nobody's data, so it needs no actor. */
export async function checkDatabase(): Promise<void> {
  try {
    await database().select({ one: sql`1` }).from(workspace).limit(1);
  } catch (error) {
    console.warn("The database is not ready.", error instanceof Error ? (error.cause ?? error) : error);
    throw new AppError("unavailable", "The database does not answer or is not migrated yet.");
  }
}
