import { uploadNetlist } from "./actions";

export type FileResult =
  | { readonly name: string; readonly state: "waiting" }
  | { readonly name: string; readonly state: "added"; readonly id: string }
  | { readonly name: string; readonly state: "refused"; readonly reason: string };

/** The longest text a netlist may have, in bytes of a file at worst (four a character). */
const MOST_BYTES = 4 * 262_144;

/** Sends one file; what cannot be a netlist is refused here, with the reason, without sending it. */
export async function sendFile(workspace: string, file: File): Promise<FileResult> {
  const refuse = (reason: string): FileResult => ({ name: file.name, state: "refused", reason });
  if (!file.name.toLowerCase().endsWith(".swn")) return refuse("Only files that end in .swn are netlists.");
  if (file.size === 0) return refuse("The file is empty.");
  if (file.size > MOST_BYTES)
    return refuse("The file is too large: a netlist has at most 262 144 characters.");
  try {
    const text = new TextDecoder("utf-8", { fatal: true }).decode(await file.arrayBuffer());
    if (text.length > 262_144) {
      return refuse(`The file has ${text.length} characters; a netlist has at most 262 144.`);
    }
    const made = await uploadNetlist(workspace, { name: file.name, text });
    return "problem" in made ? refuse(made.problem) : { name: file.name, state: "added", id: made.id };
  } catch (error) {
    if (error instanceof TypeError)
      return refuse("The file is not UTF-8 text. Save it as UTF-8 and upload it again.");
    return refuse("The service did not answer. Upload this file again.");
  }
}
