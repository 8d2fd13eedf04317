import type { z } from "zod";
import { database } from "@/db/client";
import type { Actor } from "@/lib/permissions/actor";
import { authorize } from "@/lib/permissions/authorize";
import { readInput } from "../read-input";
import { asTitle, retitled, titleIn } from "./canonical";
import { createNetlist } from "./create-netlist";
import { findNetlist } from "./find-netlist";
import { readRevision } from "./get-revision";
import { duplicateInput } from "./schemas";

/** A new netlist with the text of a revision, under the title "Copy of …"; its message says what it was made of. */
export async function duplicateRevision(
  actor: Actor,
  input: z.input<typeof duplicateInput>,
): Promise<{ id: string }> {
  const { netlistId, number } = readInput(duplicateInput, input);
  const db = database();
  const asked = await findNetlist(db, actor, netlistId);
  authorize(actor, "netlist.read", asked);
  authorize(actor, "netlist.write", asked);
  const { text } = await readRevision(db, asked.id, number);
  const title = asTitle(`Copy of ${titleIn(text) ?? asked.title}`);
  const message = `Made from revision ${number} of netlist ${asked.number}`;
  return createNetlist(actor, { title, text: retitled(text, title), message });
}
