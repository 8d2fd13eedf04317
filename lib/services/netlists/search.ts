import { and, ilike, or, type SQL, sql } from "drizzle-orm";
import type { PgColumn } from "drizzle-orm/pg-core";
import { database, type Queryable } from "@/db/client";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/actor";
import { Gate } from "../gate";

/** Longest time for one question of a search, ms: a search through long texts may hold a connection for that long. */
const LONGEST = 5_000;
/** Searches of one person at a time: fewer than there are connections. */
const searches = new Gate(3, "Your last searches are still under way. Wait a few seconds and search again.");

/** Words looked at in one search; more would only slow it down. */
const MOST_WORDS = 8;

/** Matches the rows in which every word of `query` occurs in at least one of `columns`, in any case of letters. */
export function containsWords(query: string, columns: readonly (PgColumn | SQL)[]): SQL | undefined {
  const words = query
    .split(/\s+/)
    .filter((word) => word !== "")
    .slice(0, MOST_WORDS);
  return and(...words.map((word) => or(...columns.map((column) => ilike(sql`${column}`, pattern(word))))));
}

/** A LIKE pattern for text that contains `word`, whose own percent signs, underscores and backslashes mean themselves. */
function pattern(word: string): string {
  return `%${word.replaceAll(/[\\%_]/g, "\\$&")}%`;
}

/**
 * Asks the questions of a list: with a search they are asked one after another within a time limit, which nobody's search through
 * long texts can pass. Throws "invalid" when it took longer, and "too many" when the actor has several under way.
 */
export async function searching<T>(
  actor: Actor,
  query: string,
  ask: (db: Queryable) => Promise<T>,
): Promise<T> {
  if (query.trim() === "") return ask(database());
  const leave = searches.enter(actor.userId);
  try {
    return await database().transaction(async (tx) => {
      await tx.execute(sql`select set_config('statement_timeout', ${String(LONGEST)}, true)`);
      return ask(tx);
    });
  } catch (error) {
    if (!ranOutOfTime(error)) throw error;
    throw new AppError(
      "invalid",
      `This search took longer than ${LONGEST / 1000} s. Search for one short word, or for a title.`,
    );
  } finally {
    leave();
  }
}

/** PostgreSQL's word for a statement that was cancelled, here by its time limit. */
function ranOutOfTime(error: unknown): boolean {
  const cause = error instanceof Error ? (error.cause ?? error) : error;
  return typeof cause === "object" && cause !== null && "code" in cause && cause.code === "57014";
}
