import { writeFileSync } from "node:fs";
import { resolve } from "node:path";
import type { Given } from "./options";
import { refusalOf } from "./sources";
import type { Sink, World } from "./world";

/** Writes a file that the command line names. Throws a Refusal where that is not possible. */
export function writeFileOf(name: string, text: string, world: World): void {
  try {
    writeFileSync(resolve(world.folder, name), text);
  } catch (error) {
    throw refusalOf(error, name, "written");
  }
}

/** Where the data of a command goes: stdout, or what `--output` names, which is written when the command ends. */
export class Output implements Sink {
  private readonly parts: string[] = [];
  private readonly file: string | null;

  constructor(
    given: Given,
    private readonly world: World,
  ) {
    const file = given.options.get("output");
    this.file = typeof file === "string" && file !== "-" ? file : null;
  }

  get isTerminal(): boolean {
    return this.file === null && this.world.out.isTerminal;
  }

  get columns(): number {
    return this.file === null ? this.world.out.columns : 100;
  }

  write(text: string): void {
    if (this.file === null) this.world.out.write(text);
    else this.parts.push(text);
  }

  end(): void {
    if (this.file !== null) writeFileOf(this.file, this.parts.join(""), this.world);
  }
}
