import { and, eq, isNull, sql } from "drizzle-orm";
import { database } from "@/db/client";
import { session } from "@/db/schema/session";

/** Ends a session: every later request that carries it is signed out. Ending it again changes nothing. For lib/auth alone. */
export async function endSession(sessionId: string): Promise<void> {
  await database()
    .update(session)
    .set({ endedAt: sql`now()` })
    .where(and(eq(session.id, sessionId), isNull(session.endedAt)));
}
