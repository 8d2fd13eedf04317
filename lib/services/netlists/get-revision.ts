import { and, eq } from "drizzle-orm";
import { database, type Queryable } from "@/db/client";
import { revision } from "@/db/schema/revision";
import { user } from "@/db/schema/user";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { findNetlist } from "./find-netlist";

/** One revision whole. Nothing of it ever changes. */
export interface RevisionDetail {
  readonly netlistId: string;
  readonly number: number;
  /** SHA-256 of the canonical text. */
  readonly hash: string;
  readonly text: string;
  readonly message: string | null;
  /** Name of whoever saved it. */
  readonly author: string;
  /** ISO 8601. */
  readonly savedAt: string;
}

/** Throws "not found" for a netlist that is not in the actor's workspace, and for a revision that it has not. */
export async function getRevision(actor: Actor, netlistId: string, number: number): Promise<RevisionDetail> {
  const db = database();
  const asked = await findNetlist(db, actor, netlistId);
  authorize(actor, "netlist.read", asked);
  return readRevision(db, asked.id, number);
}

/** As `getRevision`, for services that have authorised it. */
export async function readRevision(
  db: Queryable,
  netlistId: string,
  number: number,
): Promise<RevisionDetail> {
  const isNumber = Number.isInteger(number) && number > 0 && number < 2 ** 31;
  const [row] = isNumber
    ? await db
        .select({
          netlistId: revision.netlistId,
          number: revision.number,
          hash: revision.hash,
          text: revision.text,
          message: revision.message,
          author: user.name,
          savedAt: revision.createdAt,
        })
        .from(revision)
        .innerJoin(user, eq(user.id, revision.authorId))
        .where(and(eq(revision.netlistId, netlistId), eq(revision.number, number)))
    : [];
  if (row === undefined) throw new AppError("not found", "This netlist has no such revision.");
  return { ...row, savedAt: row.savedAt.toISOString() };
}
