"use server";

import { z } from "zod";
import { actorFor, currentUser } from "@/lib/auth/actor";
import { AppError } from "@/lib/errors";
import { createNetlist } from "@/lib/services/netlists/create-netlist";
import { listWorkspaces } from "@/lib/services/workspaces/list-workspaces";

export interface Room {
  readonly slug: string;
  readonly name: string;
}

/** What became of the wish to have a text as a netlist of one's own. */
export type Opened =
  | { readonly is: "made"; readonly workspace: string; readonly id: string }
  | { readonly is: "signed out" }
  /** The reader may write in several workspaces. */
  | { readonly is: "to choose"; readonly rooms: readonly Room[] }
  | { readonly is: "refused"; readonly why: string };

const wish = z.object({
  text: z.string().max(262_144, "A netlist has at most 262 144 characters."),
  workspace: z.string().max(64).optional(),
});

/** Makes a netlist of a text in the reader's workspace, or in the one they chose of several. */
export async function openInWorkspace(input: unknown): Promise<Opened> {
  const user = await currentUser();
  if (user === null) return { is: "signed out" };
  try {
    const { text, workspace } = wish.parse(input);
    const rooms = (await listWorkspaces(user)).filter(({ role }) => role !== "viewer");
    const [first] = rooms;
    if (first === undefined) {
      return {
        is: "refused",
        why: "As viewer you read what others make. An engineer, a reviewer or an admin can open this as a netlist.",
      };
    }
    if (workspace === undefined && rooms.length > 1) {
      return { is: "to choose", rooms: rooms.map(({ slug, name }) => ({ slug, name })) };
    }
    const slug = workspace ?? first.slug;
    const { id } = await createNetlist(await actorFor(slug), { text, message: "From the reference" });
    return { is: "made", workspace: slug, id };
  } catch (error) {
    if (error instanceof AppError) return { is: "refused", why: error.message };
    if (error instanceof z.ZodError) {
      return { is: "refused", why: error.issues[0]?.message ?? "The text cannot be opened." };
    }
    throw error;
  }
}
