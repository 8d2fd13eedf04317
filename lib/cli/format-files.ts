import { format } from "@/lib/language/format";
import { OWN } from "@/lib/language/limits";
import { FORMAT } from "./commands";
import { EXIT, type ExitCode } from "./exit-codes";
import { type Given, usage } from "./options";
import { Output, writeFileOf } from "./output";
import { readSources } from "./sources";
import type { World } from "./world";

/** `sweepwright format`. */
export async function formatFiles(given: Given, world: World): Promise<ExitCode> {
  const [isCheck, isWrite] = [given.options.has("check"), given.options.has("write")];
  if (isCheck && isWrite) throw usage("--check and --write exclude each other.", FORMAT);
  if (isWrite && given.files.includes("-")) throw usage("Standard input cannot be rewritten.", FORMAT);
  if (!isCheck && !isWrite && given.files.length > 1) {
    throw usage("Several files can be checked or rewritten, not printed; add --check or --write.", FORMAT);
  }
  const sources = await readSources(given.files, world);
  const output = new Output(given, world);
  const formatted = (text: string) => format(text, OWN.text);
  const changed = sources.filter(({ text }) => formatted(text) !== text);
  if (!isCheck && !isWrite) output.write(formatted(sources[0]!.text));
  else for (const { name } of changed) output.write(`${name}\n`);
  if (isWrite) for (const { name, text } of changed) writeFileOf(name, formatted(text), world);
  output.end();
  return isCheck && changed.length > 0 ? EXIT.broken : EXIT.holds;
}
