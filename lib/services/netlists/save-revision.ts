import type { z } from "zod";
import { database } from "@/db/client";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { readInput } from "../read-input";
import { addRevision, type Saved } from "./add-revision";
import { findNetlist } from "./find-netlist";
import { fitText, saveInput } from "./schemas";

/**
 * Saves a text as the netlist's next revision. `base` is the revision it was written upon; a stale one is a "conflict" with
 * `details.latest`. The same canonical text as the newest revision's adds nothing.
 */
export async function saveRevision(actor: Actor, input: z.input<typeof saveInput>): Promise<Saved> {
  const { netlistId, ...change } = readInput(saveInput, input);
  return database().transaction(async (tx) => {
    const locked = await findNetlist(tx, actor, netlistId, true);
    authorize(actor, "netlist.write", locked);
    fitText(change.text);
    return addRevision(tx, actor, locked, change);
  });
}
