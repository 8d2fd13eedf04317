import { setImmediate } from "node:timers/promises";
import { desc, eq, sql } from "drizzle-orm";
import type { z } from "zod";
import { database } from "@/db/client";
import { revision } from "@/db/schema/revision";
import { user } from "@/db/schema/user";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { readInput } from "../read-input";
import { findNetlist } from "./find-netlist";
import { type LastRun, lastRunOfRevision, shownRun } from "./last-run";
import { revisionsInput } from "./schemas";
import { Summaries } from "./summaries";

export interface RevisionRow {
  readonly number: number;
  /** SHA-256 of the canonical text. */
  readonly hash: string;
  readonly message: string | null;
  /** Name of whoever saved it. */
  readonly author: string;
  /** ISO 8601. */
  readonly savedAt: string;
  readonly lastRun: LastRun | null;
  /** What changed from the revision before it, in short; null of the first one and of texts too long to be compared in a list. */
  readonly changes: string | null;
}

/** One page of the revisions of a netlist, the newest first. Throws "not found" for another workspace's. */
export async function listRevisions(
  actor: Actor,
  input: z.input<typeof revisionsInput>,
): Promise<{ rows: RevisionRow[]; total: number }> {
  const { netlistId, page, size } = readInput(revisionsInput, input);
  const db = database();
  const asked = await findNetlist(db, actor, netlistId);
  authorize(actor, "netlist.read", asked);
  const lastRun = lastRunOfRevision(db);
  // One more than the page shows: the last row is compared with it.
  const found = await db
    .select({
      number: revision.number,
      hash: revision.hash,
      message: revision.message,
      author: user.name,
      savedAt: revision.createdAt,
      text: revision.text,
      lastRun: shownRun(lastRun),
    })
    .from(revision)
    .innerJoin(user, eq(user.id, revision.authorId))
    .leftJoinLateral(lastRun, sql`true`)
    .where(eq(revision.netlistId, asked.id))
    .orderBy(desc(revision.number))
    .limit(size + 1)
    .offset((page - 1) * size);
  const summaries = new Summaries();
  const rows: RevisionRow[] = [];
  for (const [index, { text, savedAt, ...row }] of found.slice(0, size).entries()) {
    // A hundred long texts take seconds: whoever else waits for this process comes between two of them.
    await setImmediate();
    const before = found[index + 1];
    const changes = before === undefined ? null : summaries.of(before, { text, hash: row.hash });
    rows.push({ ...row, savedAt: savedAt.toISOString(), changes });
  }
  // Numbers have no gaps and nothing is ever taken away.
  return { rows, total: asked.latestRevision };
}
