import { and, eq, getTableColumns } from "drizzle-orm";
import { z } from "zod";
import type { Queryable } from "@/db/client";
import { run } from "@/db/schema/run";
import type { Actor } from "@/lib/permissions/actor";

/** A run row without its plan, which may hold a million axis values, and without its judgement. */
export type RunRecord = Omit<typeof run.$inferSelect, "plan" | "judgement">;

const { plan: _plan, judgement: _judgement, ...COLUMNS } = getTableColumns(run);

/** The run of that id in the actor's workspace, for `authorize` to judge; undefined when there is none. */
export async function findRun(db: Queryable, actor: Actor, id: string): Promise<RunRecord | undefined> {
  if (!z.uuid().safeParse(id).success) return undefined;
  const [row] = await db
    .select(COLUMNS)
    .from(run)
    .where(and(eq(run.id, id), eq(run.workspaceId, actor.workspaceId)));
  return row;
}
