import { readdir, readFile } from "node:fs/promises";
import { join, resolve } from "node:path";
import { and, eq } from "drizzle-orm";
import { Client } from "pg";
import { hashPassword } from "@/lib/auth/password";
import { demoEnv } from "@/lib/env";
import type { Actor } from "@/lib/permissions/actor";
import { closeQueue } from "@/lib/queue/producer";
import { createNetlist } from "@/lib/services/netlists/create-netlist";
import { saveRevision } from "@/lib/services/netlists/save-revision";
import { startRun } from "@/lib/services/runs/start-run";
import { closeDatabase, database } from "./client";
import { DEMO_PEOPLE } from "./demo-people";
import { STORY, textsOf } from "./demo-story";
import { membership } from "./schema/membership";
import { netlist } from "./schema/netlist";
import { revision } from "./schema/revision";
import { run } from "./schema/run";
import { user } from "./schema/user";
import { workspace } from "./schema/workspace";

/** Any number of our own, another than that of migrate: processes that seed wait for one another on it. */
const LOCK = 7_396_105;

/** An invented maker of colour-measuring and flow instruments. */
const BENCH = { slug: "north-bench", name: "Northbench Instruments (invented)" } as const;

/**
 * Makes the demo in the database at `url`: a workspace, four people, every netlist of `examples` with a queued run, and one netlist
 * of several revisions, each with a queued run. Safe to call again and from several processes at once: what is there already stays as it is, also when somebody has changed it.
 * Sets DATABASE_URL of this process, and closes what it opened.
 */
export async function seed(url: string, examples = resolve("examples")): Promise<void> {
  process.env.DATABASE_URL = url;
  const holder = new Client({ connectionString: url });
  await holder.connect();
  try {
    await holder.query("SELECT pg_advisory_lock($1)", [LOCK]);
    const actors = await people();
    await netlists(actors[1]!, examples);
    await story(actors);
  } finally {
    await Promise.all([closeQueue(), closeDatabase()]);
    // The lock goes with its connection, after everything else, so that two seeds of one process do not share what is closed.
    await holder.end();
  }
}

/** The workspace and its members, as actors in the order of DEMO_PEOPLE. */
async function people(): Promise<Actor[]> {
  const db = database();
  await db.insert(workspace).values(BENCH).onConflictDoNothing();
  const [room] = await db.select({ id: workspace.id }).from(workspace).where(eq(workspace.slug, BENCH.slug));
  const { SWEEPWRIGHT_DEMO_PASSWORD } = demoEnv();
  const actors: Actor[] = [];
  for (const { email, name, role } of DEMO_PEOPLE) {
    if ((await userId(email)) === undefined) {
      const passwordHash = await hashPassword(SWEEPWRIGHT_DEMO_PASSWORD);
      await db.transaction(async (tx) => {
        const [made] = await tx.insert(user).values({ email, name, passwordHash }).returning({ id: user.id });
        await tx.insert(membership).values({ workspaceId: room!.id, userId: made!.id, role });
      });
    }
    const who = { userId: (await userId(email))!, name, email, role };
    // The seed signs nobody in, so its session id is nobody's.
    actors.push({ ...who, sessionId: "", workspaceId: room!.id, workspaceSlug: BENCH.slug });
  }
  return actors;
}

async function userId(email: string): Promise<string | undefined> {
  const [row] = await database().select({ id: user.id }).from(user).where(eq(user.email, email));
  return row?.id;
}

/** Makes and queues each example that the workspace does not hold yet; the message of its first revision names the file. */
async function netlists(actor: Actor, folder: string): Promise<void> {
  const files = (await readdir(folder)).filter((name) => name.endsWith(".swn")).sort();
  if (files.length === 0) throw new Error(`The folder ${folder} holds no example (*.swn).`);
  for (const file of files) {
    const message = `Example ${file}: invented, for the demo`;
    const known = await netlistWith(actor, message);
    const id =
      known?.id ??
      (await createNetlist(actor, { text: await readFile(join(folder, file), "utf8"), message })).id;
    if (known === undefined || !known.ran) await startRun(actor, { netlistId: id, base: 1 });
  }
}

/** Makes the netlist of the story, or goes on where an earlier seed was cut off; a history that somebody has continued stays as it is. */
async function story(actors: readonly Actor[]): Promise<void> {
  const texts = textsOf(STORY);
  const known = await netlistWith(actors[1]!, STORY[0]!.message);
  let id = known?.id;
  for (const [place, { by, message }] of STORY.entries()) {
    const actor = actors.find(({ email }) => email === by)!;
    const number = place + 1;
    const text = texts[place]!;
    if (id === undefined) ({ id } = await createNetlist(actor, { text, message }));
    const saved = await revisionOf(id, number);
    if (saved === undefined) await saveRevision(actor, { netlistId: id, base: place, text, message });
    else if (saved.message !== message) return;
    if (saved?.ran !== true) await startRun(actor, { netlistId: id, base: number });
  }
}

async function revisionOf(
  id: string,
  number: number,
): Promise<{ message: string | null; ran: boolean } | undefined> {
  const [row] = await database()
    .select({ message: revision.message, run: run.id })
    .from(revision)
    .leftJoin(run, and(eq(run.netlistId, revision.netlistId), eq(run.revisionNumber, revision.number)))
    .where(and(eq(revision.netlistId, id), eq(revision.number, number)))
    .limit(1);
  return row && { message: row.message, ran: row.run !== null };
}

async function netlistWith(actor: Actor, message: string): Promise<{ id: string; ran: boolean } | undefined> {
  const [row] = await database()
    .select({ id: netlist.id, run: run.id })
    .from(netlist)
    .innerJoin(revision, and(eq(revision.netlistId, netlist.id), eq(revision.number, 1)))
    .leftJoin(run, eq(run.netlistId, netlist.id))
    .where(and(eq(netlist.workspaceId, actor.workspaceId), eq(revision.message, message)))
    .limit(1);
  return row && { id: row.id, ran: row.run !== null };
}
