import { and, eq, isNull, sql } from "drizzle-orm";
import { z } from "zod";
import { database } from "@/db/client";
import { session } from "@/db/schema/session";
import { user } from "@/db/schema/user";
import type { User } from "@/lib/permissions/actor";

/** A session that nobody used for this long is over. */
const IDLE = sql`interval '30 days'`;

/** Who a session belongs to; null when it has ended, lay idle for 30 days or never was. Notes the visit once a minute. */
export async function findUser(sessionId: string): Promise<User | null> {
  if (!z.uuid().safeParse(sessionId).success) return null;
  const db = database();
  const [row] = await db
    .select({
      userId: user.id,
      name: user.name,
      email: user.email,
      stale: sql<boolean>`${session.lastSeenAt} < now() - interval '1 minute'`,
    })
    .from(session)
    .innerJoin(user, eq(user.id, session.userId))
    .where(
      and(eq(session.id, sessionId), isNull(session.endedAt), sql`${session.lastSeenAt} > now() - ${IDLE}`),
    );
  if (row === undefined) return null;
  if (row.stale) await db.update(session).set({ lastSeenAt: sql`now()` }).where(eq(session.id, sessionId));
  return { userId: row.userId, name: row.name, email: row.email, sessionId };
}
