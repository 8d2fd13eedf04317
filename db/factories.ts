import { randomBytes } from "node:crypto";
import { and, eq } from "drizzle-orm";
import { compile } from "@/lib/analyses/compile";
import { hashPassword } from "@/lib/auth/password";
import type { Actor, Role } from "@/lib/permissions/actor";
import { createNetlist } from "@/lib/services/netlists/create-netlist";
import { type AddedRun, addRun } from "@/lib/services/runs/add-run";
import { openSession } from "@/lib/services/sessions/open-session";
import { database } from "./client";
import { membership } from "./schema/membership";
import { netlist } from "./schema/netlist";
import { revision } from "./schema/revision";
import { user } from "./schema/user";
import { workspace } from "./schema/workspace";

/** Rows for tests. Each call makes new ones under names of their own, so that tests share nothing. All of it is invented. */

export const PASSWORD = "an invented password";

let hashed: Promise<string> | undefined;

/** A netlist that runs: a current of 1 nA to 1 mA through a diode, 5 points a decade, 31 points, one trace. */
export const DIODE_TEXT = `title "A diode"
knob I_in = 1 µA
model junction : diode { Is = 2 fA, n = 1.05 }
ground -- IS : current I_in -- s
s -- D1 : junction -- ground
sweep I_in from 1 nA to 1 mA, 5 per decade
show v = s.v
`;

const word = () => randomBytes(5).toString("hex");

export interface MadeWorkspace {
  readonly id: string;
  readonly slug: string;
}

export async function makeWorkspace(): Promise<MadeWorkspace> {
  const slug = `bench-${word()}`;
  const [made] = await database()
    .insert(workspace)
    .values({ slug, name: `Invented bench ${slug}` })
    .returning({ id: workspace.id, slug: workspace.slug });
  return made!;
}

/** A person whose password is PASSWORD. */
export async function makeUser(name = "Ilse Invented"): Promise<{ id: string; email: string; name: string }> {
  hashed ??= hashPassword(PASSWORD);
  const [made] = await database()
    .insert(user)
    .values({ email: `${word()}@bench.example`, name, passwordHash: await hashed })
    .returning({ id: user.id, email: user.email, name: user.name });
  return made!;
}

/** A member of `of` (a new workspace unless given) with an open session. */
export async function makeActor(role: Role = "engineer", of?: MadeWorkspace, name?: string): Promise<Actor> {
  const { id: workspaceId, slug } = of ?? (await makeWorkspace());
  const { id: userId, ...who } = await makeUser(name);
  await database().insert(membership).values({ workspaceId, userId, role });
  const sessionId = await openSession({ userId, userAgent: "a test", address: "192.0.2.1" });
  return { userId, ...who, sessionId, workspaceId, workspaceSlug: slug, role };
}

export async function makeNetlist(actor: Actor, text = DIODE_TEXT): Promise<{ id: string }> {
  return createNetlist(actor, { text });
}

/**
 * A queued run of the first revision of a new netlist with `text`, or of the newest one of `netlistId`. It is in the tables only:
 * no job for it is on the queue.
 */
export async function makeRun(
  actor: Actor,
  { text, netlistId }: { readonly text?: string; readonly netlistId?: string } = {},
): Promise<AddedRun & { readonly netlistId: string }> {
  const id = netlistId ?? (await makeNetlist(actor, text)).id;
  const [of] = await database()
    .select({ id: netlist.id, title: netlist.title, number: revision.number, text: revision.text })
    .from(netlist)
    .innerJoin(revision, and(eq(revision.netlistId, netlist.id), eq(revision.number, netlist.latestRevision)))
    .where(eq(netlist.id, id));
  const { job, diagnostics } = compile(of!.text);
  if (job === null) throw new Error(`The text does not run: ${diagnostics.map((d) => d.message).join(" ")}`);
  const added = await database().transaction((tx) => addRun(tx, actor, of!, of!.number, job.plan));
  return { ...added, netlistId: id };
}
