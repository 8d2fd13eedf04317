import { and, count, desc, eq, sql } from "drizzle-orm";
import type { z } from "zod";
import { database } from "@/db/client";
import { netlist } from "@/db/schema/netlist";
import { revision } from "@/db/schema/revision";
import { run } from "@/db/schema/run";
import { user } from "@/db/schema/user";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { containsWords } from "../netlists/search";
import { readInput } from "../read-input";
import { RUN_COLUMNS, type RunRow, rowOf } from "./run-columns";
import { listInput } from "./schemas";

/** One page of the runs of the actor's workspace, the newest first. A search looks at titles, people and run numbers. */
export async function listRuns(
  actor: Actor,
  input: z.input<typeof listInput>,
): Promise<{ rows: RunRow[]; total: number }> {
  authorize(actor, "run.read", { workspaceId: actor.workspaceId });
  const { query, status, netlistId, revision: number, page, size } = readInput(listInput, input);
  const db = database();
  const matches = and(
    eq(run.workspaceId, actor.workspaceId),
    status === undefined ? undefined : eq(run.status, status),
    netlistId === undefined ? undefined : eq(run.netlistId, netlistId),
    number === undefined ? undefined : eq(run.revisionNumber, number),
    containsWords(query, [run.title, user.name, sql`${run.number}::text`]),
  );
  const found = db
    .select(RUN_COLUMNS)
    .from(run)
    .innerJoin(netlist, eq(netlist.id, run.netlistId))
    .innerJoin(revision, and(eq(revision.netlistId, run.netlistId), eq(revision.number, run.revisionNumber)))
    .innerJoin(user, eq(user.id, run.requestedBy))
    .where(matches)
    .orderBy(desc(run.number))
    .limit(size)
    .offset((page - 1) * size);
  const counted = db
    .select({ total: count() })
    .from(run)
    .innerJoin(user, eq(user.id, run.requestedBy))
    .where(matches);
  const [rows, [all]] = await Promise.all([found, counted]);
  return { rows: rows.map(rowOf), total: all?.total ?? 0 };
}
