import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { readInput } from "../read-input";
import { createNetlist } from "./create-netlist";
import { netlistFile } from "./schemas";

/** What became of one file: the netlist made from it, or the sentence that says why none was. */
export type Uploaded = { readonly id: string } | { readonly problem: string };

/** Makes a netlist of each `.swn` file, in order; a file that cannot be one does not hold up the others. */
export async function uploadNetlists(
  actor: Actor,
  files: readonly { readonly name: string; readonly text: string }[],
): Promise<Uploaded[]> {
  authorize(actor, "netlist.write", { workspaceId: actor.workspaceId });
  const results: Uploaded[] = [];
  for (const file of files) {
    try {
      results.push(await take(actor, file));
    } catch (error) {
      if (!(error instanceof AppError)) throw error;
      results.push({ problem: error.message });
    }
  }
  return results;
}

async function take(actor: Actor, file: unknown): Promise<{ id: string }> {
  const { name, text } = readInput(netlistFile, file);
  if (!/\.swn$/i.test(name)) throw new AppError("invalid", "Only files that end in .swn are netlists.");
  if (text.trim() === "") throw new AppError("invalid", "The file is empty.");
  const title = name
    .replace(/^.*[\\/]/, "")
    .slice(0, -".swn".length)
    .slice(0, 120)
    // The cut may have left half of a character, which could not be stored.
    .replace(/\p{Surrogate}$/u, "");
  return createNetlist(actor, { title, text: text.replace(/^\uFEFF/, "") });
}
