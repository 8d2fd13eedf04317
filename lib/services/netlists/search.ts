import { and, ilike, or, type SQL, sql } from "drizzle-orm";
import type { PgColumn } from "drizzle-orm/pg-core";

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
