"use server";

import { z } from "zod";
import { actorFor } from "@/lib/auth/actor";
import { AppError } from "@/lib/errors";
import { createNetlist } from "@/lib/services/netlists/create-netlist";
import { uploadNetlists } from "@/lib/services/netlists/upload-netlists";
import { starterText } from "./starter";

/** What became of a wish: the new netlist's id, or the sentence that says why not. */
export type Made = { readonly id: string } | { readonly problem: string };

const newNetlist = z.object({
  title: z
    .string()
    .trim()
    .min(1, "Give the netlist a title, so that others can find it.")
    .max(120, "A title has at most 120 characters."),
});

const upload = z.object({ name: z.string().min(1).max(255), text: z.string().max(262_144) });

function sentence(error: unknown): string {
  if (error instanceof AppError) return error.message;
  if (error instanceof z.ZodError) return error.issues[0]?.message ?? "The form is not complete.";
  throw error;
}

/** Makes a netlist with a small text that runs. */
export async function makeNetlist(workspace: string, input: unknown): Promise<Made> {
  try {
    const { title } = newNetlist.parse(input);
    const actor = await actorFor(workspace);
    const { id } = await createNetlist(actor, { title, text: starterText(title) });
    return { id };
  } catch (error) {
    return { problem: sentence(error) };
  }
}

/** Takes in one `.swn` file. The table sends several one after another, so each keeps below the limit for one request. */
export async function uploadNetlist(workspace: string, input: unknown): Promise<Made> {
  try {
    const file = upload.parse(input);
    const [result] = await uploadNetlists(await actorFor(workspace), [file]);
    if (result === undefined) return { problem: "The service gave no answer for this file." };
    return "problem" in result ? { problem: result.problem } : { id: result.id };
  } catch (error) {
    return { problem: sentence(error) };
  }
}
