import type { z } from "zod";
import { database } from "@/db/client";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { readInput } from "../read-input";
import { addRevision, type Saved } from "./add-revision";
import { findNetlist } from "./find-netlist";
import { readRevision } from "./get-revision";
import { restoreInput } from "./schemas";

/**
 * Saves the text of an earlier revision as the next one, whose message says so. `base` is the newest revision that the reader knows of;
 * a stale one is a "conflict" with `details.latest`, so that nobody's newer text is put aside unseen. Adds nothing where the newest
 * revision has that text already.
 */
export async function restoreRevision(actor: Actor, input: z.input<typeof restoreInput>): Promise<Saved> {
  const { netlistId, number, base, message } = readInput(restoreInput, input);
  return database().transaction(async (tx) => {
    const locked = await findNetlist(tx, actor, netlistId, true);
    authorize(actor, "netlist.write", locked);
    const { text } = await readRevision(tx, locked.id, number);
    return addRevision(tx, actor, locked, {
      base,
      text,
      message: message || `Text of revision ${number} restored`,
    });
  });
}
