import { readFileSync } from "node:fs";
import { readFile } from "node:fs/promises";
import { dirname, join, resolve } from "node:path";
import { EXIT, Refusal } from "./exit-codes";
import type { World } from "./world";

/** Texts by the names that `use` brings them in under. */
export type Shelf = Readonly<Record<string, string>>;

export interface Source {
  /** As it is written on the command line; "-" is standard input. */
  readonly name: string;
  readonly text: string;
  /** Where `use "NAME"` looks for NAME.swn. */
  readonly folder: string;
}

/** Reads every file in its order. Throws a Refusal for one that cannot be read. */
export async function readSources(names: readonly string[], world: World): Promise<Source[]> {
  if (names.filter((name) => name === "-").length > 1) {
    throw new Refusal("Standard input can be read once; give `-` once.", EXIT.usage);
  }
  const sources: Source[] = [];
  for (const name of names) sources.push(await readSource(name, world));
  return sources;
}

async function readSource(name: string, world: World): Promise<Source> {
  const path = resolve(world.folder, name);
  try {
    const bytes = name === "-" ? await world.input() : await readFile(path);
    return { name, text: decode(bytes, name), folder: name === "-" ? world.folder : dirname(path) };
  } catch (error) {
    throw refusalOf(error, name, "read");
  }
}

function decode(bytes: Uint8Array, name: string): string {
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(bytes);
  } catch {
    throw new Refusal(`${name} is not text in UTF-8; save it in that encoding.`, EXIT.netlist);
  }
}

/** What to say of a file that the system would not give or take. */
export function refusalOf(error: unknown, name: string, deed: "read" | "written"): unknown {
  switch ((error as NodeJS.ErrnoException).code) {
    case "ENOENT":
      return new Refusal(`${name} is not there; check the path.`, EXIT.usage);
    case "EISDIR":
      return new Refusal(`${name} is a folder; name files, as in \`${join(name, "*.swn")}\`.`, EXIT.usage);
    case "EACCES":
    case "EPERM":
    case "EROFS":
      return new Refusal(`${name} may not be ${deed}; check its permissions.`, EXIT.notAllowed);
    default:
      return error;
  }
}

/** A shelf that finds NAME.swn beside a source and remembers what it gave, for threads that have no files. */
export class FolderShelf {
  private readonly found: Record<string, string> = {};

  constructor(private readonly folder: string) {}

  get texts(): Shelf {
    return this.found;
  }

  /** The text of NAME.swn; null where there is none, or where the name leads out of the folder. */
  find(name: string): string | null {
    if (/[/\\]|^\.+$/.test(name) || name === "") return null;
    try {
      const text = readFileSync(join(this.folder, `${name}.swn`), "utf8");
      this.found[name] = text;
      return text;
    } catch {
      return null;
    }
  }
}
