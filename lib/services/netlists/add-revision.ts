import { and, eq, sql } from "drizzle-orm";
import type { Queryable } from "@/db/client";
import { netlist } from "@/db/schema/netlist";
import { revision } from "@/db/schema/revision";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/actor";
import { hashOf, titleIn } from "./canonical";
import type { NetlistRecord } from "./find-netlist";

export interface Saved {
  readonly revision: number;
  readonly hash: string;
  /** False when the canonical text was the newest one already, so that nothing was added. */
  readonly changed: boolean;
}

/**
 * Adds a revision to `locked`, whose row the transaction `tx` holds locked. A text that means and reads the same as the newest
 * one changes nothing, from whatever base. Throws "conflict" with `details.latest` when the text was written upon a revision
 * that is no longer the newest. For services that have authorised it.
 */
export async function addRevision(
  tx: Queryable,
  actor: Actor,
  locked: NetlistRecord,
  {
    base,
    text,
    message,
  }: { readonly base: number; readonly text: string; readonly message?: string | undefined },
): Promise<Saved> {
  const latest = locked.latestRevision;
  const hash = hashOf(text);
  const [newest] = await tx
    .select({ hash: revision.hash })
    .from(revision)
    .where(and(eq(revision.netlistId, locked.id), eq(revision.number, latest)));
  if (newest?.hash === hash) return { revision: latest, hash, changed: false };
  if (base !== latest) {
    throw new AppError(
      "conflict",
      `Revision ${latest} was saved meanwhile; your text was written upon revision ${base}. Load the newest one and bring your change into it.`,
      { latest },
    );
  }
  const number = latest + 1;
  const values = {
    netlistId: locked.id,
    number,
    hash,
    text,
    message: message || null,
    authorId: actor.userId,
  };
  await tx.insert(revision).values(values);
  await tx
    .update(netlist)
    .set({ latestRevision: number, title: titleIn(text) ?? locked.title, updatedAt: sql`now()` })
    .where(eq(netlist.id, locked.id));
  return { revision: number, hash, changed: true };
}
