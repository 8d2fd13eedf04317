import { and, eq, isNull, lt, sql } from "drizzle-orm";
import { database } from "@/db/client";
import { keptAnswer } from "@/db/schema/kept-answer";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/actor";

/** An answer that can be given again: plain data and its HTTP status. */
export interface Answer {
  readonly status: number;
  readonly body: unknown;
}

interface Asked {
  readonly key: string;
  /** A digest of all that the request says. */
  readonly request: string;
}

/** A claim older than this was left by a process that ended in the middle: the request is worked on anew. */
const GIVEN_UP = sql`now() - interval '2 minutes'`;
const FORGOTTEN = sql`now() - interval '1 day'`;

/**
 * Does `work` once for a key of the actor's, and gives what it came to each time the same request comes again within a day. Whatever
 * `work` throws is thrown, and the key may be used again. Throws "key reused" where the key stood for another request, and "conflict"
 * while the first one is still being worked on. What may be done is for `work` to authorise.
 */
export async function answerOnce(
  { userId }: Pick<Actor, "userId">,
  { key, request }: Asked,
  work: () => Promise<Answer>,
): Promise<Answer> {
  const db = database();
  const mine = and(eq(keptAnswer.userId, userId), eq(keptAnswer.key, key));
  await db.delete(keptAnswer).where(and(eq(keptAnswer.userId, userId), lt(keptAnswer.createdAt, FORGOTTEN)));
  await db.delete(keptAnswer).where(and(mine, isNull(keptAnswer.status), lt(keptAnswer.createdAt, GIVEN_UP)));
  const [claimed] = await db
    .insert(keptAnswer)
    .values({ userId, key, request })
    .onConflictDoNothing()
    .returning({ key: keptAnswer.key });
  if (claimed === undefined) return answerOf(await first(userId, key), request);
  let answer: Answer;
  try {
    answer = await work();
  } catch (error) {
    // Should the database be away, the claim is given up by its age, and the reader is told what went wrong first.
    await db
      .delete(keptAnswer)
      .where(mine)
      .catch(() => undefined);
    throw error;
  }
  // Where the answer cannot be kept, the key stays taken: what was made would be made a second time.
  await db.update(keptAnswer).set({ status: answer.status, body: answer.body }).where(mine);
  return answer;
}

async function first(userId: string, key: string) {
  const [row] = await database()
    .select({ request: keptAnswer.request, status: keptAnswer.status, body: keptAnswer.body })
    .from(keptAnswer)
    .where(and(eq(keptAnswer.userId, userId), eq(keptAnswer.key, key)));
  return row;
}

function answerOf(kept: Awaited<ReturnType<typeof first>>, request: string): Answer {
  if (kept !== undefined && kept.request !== request) {
    throw new AppError(
      "key reused",
      "This Idempotency-Key stands for another request. Give each request a key of its own.",
    );
  }
  // Absent: the first request failed a moment ago, and this one came between.
  if (kept === undefined || kept.status === null) {
    throw new AppError(
      "conflict",
      "A request with this Idempotency-Key is still being worked on. Ask again in a few seconds.",
    );
  }
  return { status: kept.status, body: kept.body };
}
