import { check } from "./check";
import { COMMANDS, helpOf, overview } from "./commands";
import { EXIT, type ExitCode, Refusal } from "./exit-codes";
import { formatFiles } from "./format-files";
import { type Given, readOptions, usage } from "./options";
import { runFiles } from "./run-files";
import { realWorld, type World } from "./world";

const DEEDS: Readonly<Record<string, (given: Given, world: World) => Promise<ExitCode>>> = {
  check,
  run: runFiles,
  format: formatFiles,
};

/** Does what the words of a command line say. Answers with the code to leave with; complaints go to stderr. */
export async function command(words: readonly string[], world: World): Promise<ExitCode> {
  try {
    return await obey(words, world);
  } catch (error) {
    if (world.signal.aborted) {
      world.err.write("Interrupted; nothing more is solved.\n");
      return EXIT.interrupted;
    }
    if (!(error instanceof Refusal)) throw error;
    world.err.write(`sweepwright: ${error.message}\n`);
    return error.code;
  }
}

async function obey([name, ...words]: readonly string[], world: World): Promise<ExitCode> {
  if (name === undefined) throw new Refusal(`A command is wanted.\n\n${overview()}`.trimEnd(), EXIT.usage);
  if (["help", "--help", "-h"].includes(name)) {
    world.out.write(overview());
    return EXIT.holds;
  }
  const known = COMMANDS.find((one) => one.name === name);
  if (known === undefined) {
    const names = COMMANDS.map((one) => one.name).join(", ");
    throw new Refusal(`${name} is no command; the commands are ${names}.`, EXIT.usage);
  }
  const given = readOptions(words, known);
  if (given.options.has("help")) {
    world.out.write(helpOf(known));
    return EXIT.holds;
  }
  if (given.files.length === 0) throw usage("No FILE is given.", known);
  return DEEDS[name]!(given, world);
}

/** For the launcher: the process as the world. An error of the program itself is told in full and leaves with code 5. */
export async function main(words: readonly string[]): Promise<void> {
  try {
    process.exitCode = await command(words, realWorld());
  } catch (error) {
    process.stderr.write(`sweepwright broke down; please report this:\n${(error as Error).stack ?? error}\n`);
    process.exitCode = EXIT.service;
  }
}
