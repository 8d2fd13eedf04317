import { and, asc, count, desc, eq, isNotNull, isNull, type SQL, sql } from "drizzle-orm";
import type { z } from "zod";
import { netlist } from "@/db/schema/netlist";
import { revision } from "@/db/schema/revision";
import { user } from "@/db/schema/user";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { readInput } from "../read-input";
import { type LastRun, lastRunOf, netlistColumns } from "./last-run";
import { listInput } from "./schemas";
import { containsWords, searching } from "./search";

export interface NetlistRow {
  readonly id: string;
  readonly number: number;
  readonly title: string;
  /** Name of whoever made it. */
  readonly owner: string;
  /** ISO 8601. */
  readonly updatedAt: string;
  readonly revision: number;
  readonly lastRun: LastRun | null;
}

/**
 * One page of the netlists of the actor's workspace: those in use, or the archived ones. A search looks at titles, owners and the text of
 * the newest revision. Sorted by status, those that never ran come last either way.
 */
export async function listNetlists(
  actor: Actor,
  input: z.input<typeof listInput>,
): Promise<{ rows: NetlistRow[]; total: number }> {
  authorize(actor, "netlist.read", { workspaceId: actor.workspaceId });
  const { query, which, sort, direction, page, size } = readInput(listInput, input);
  const [rows, total] = await searching(actor, query, async (db) => {
    const lastRun = lastRunOf(db);
    const keys: Record<typeof sort, SQL> = {
      title: sql`lower(${netlist.title})`,
      updated: sql`${netlist.updatedAt}`,
      owner: sql`lower(${user.name})`,
      status: sql`${lastRun.status}`,
    };
    const order = direction === "ascending" ? asc : desc;
    const matches = and(
      eq(netlist.workspaceId, actor.workspaceId),
      which === "archived" ? isNotNull(netlist.archivedAt) : isNull(netlist.archivedAt),
      containsWords(query, [netlist.title, user.name, revision.text]),
    );
    const isNewest = and(eq(revision.netlistId, netlist.id), eq(revision.number, netlist.latestRevision));
    const found = await db
      .select(netlistColumns(lastRun))
      .from(netlist)
      .innerJoin(user, eq(user.id, netlist.createdBy))
      .innerJoin(revision, isNewest)
      .leftJoinLateral(lastRun, sql`true`)
      .where(matches)
      .orderBy(sql`${order(keys[sort])} nulls last`, order(netlist.number))
      .limit(size)
      .offset((page - 1) * size);
    const [all] = await db
      .select({ total: count() })
      .from(netlist)
      .innerJoin(user, eq(user.id, netlist.createdBy))
      .innerJoin(revision, isNewest)
      .where(matches);
    return [found, all?.total ?? 0] as const;
  });
  return { rows: rows.map((row) => ({ ...row, updatedAt: row.updatedAt.toISOString() })), total };
}
