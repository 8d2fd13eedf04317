import { nearest } from "@/lib/language/nearest";
import { EXIT, Refusal } from "./exit-codes";

/** An option of a command. `takes` is the word for its value in the help, null for a mere flag. */
export interface Option {
  readonly name: string;
  readonly takes: string | null;
  readonly about: string;
}

export interface Command {
  readonly name: string;
  readonly about: string;
  readonly options: readonly Option[];
  /** Further lines of the help, such as what is written where. */
  readonly notes: readonly string[];
}

/** What stood on the command line: values by option, true for a flag; the rest in its order. */
export interface Given {
  readonly options: ReadonlyMap<string, string | true>;
  readonly files: readonly string[];
}

/**
 * Reads `--name`, `--name value`, `--name=value`; `-` is standard input and `--` ends the options. Throws a Refusal that names
 * the nearest option.
 */
export function readOptions(words: readonly string[], command: Command): Given {
  const options = new Map<string, string | true>();
  const files: string[] = [];
  for (let i = 0; i < words.length; i++) {
    const word = words[i]!;
    if (word === "--") {
      files.push(...words.slice(i + 1));
      break;
    }
    if (word === "-" || !word.startsWith("-")) {
      files.push(word);
      continue;
    }
    const [written, ...rest] = word.split("=");
    const name = written === "-h" ? "help" : written!.replace(/^--/, "");
    const option = command.options.find((one) => one.name === name);
    if (option === undefined || options.has(name)) throw refused(written!, command, option);
    const inline = rest.length > 0 ? rest.join("=") : null;
    if (option.takes === null) {
      if (inline !== null) throw usage(`--${name} takes no value.`, command);
      options.set(name, true);
      continue;
    }
    const value = inline ?? words[++i];
    if (value === undefined || value === "")
      throw usage(`--${name} wants ${option.takes} after it.`, command);
    options.set(name, value);
  }
  return { options, files };
}

function refused(written: string, command: Command, option: Option | undefined): Refusal {
  if (option !== undefined) return usage(`--${option.name} is given twice.`, command);
  const near = nearest(
    written.replace(/^-+/, ""),
    command.options.map(({ name }) => name),
  );
  const proposal = near === null ? "" : ` Did you mean --${near}?`;
  return usage(`${written} is no option of \`sweepwright ${command.name}\`.${proposal}`, command);
}

export function usage(message: string, command: { readonly name: string }): Refusal {
  return new Refusal(`${message} \`sweepwright ${command.name} --help\` lists what it takes.`, EXIT.usage);
}

/** A whole number of at least `least` that an option gives; `otherwise` where it is not given. */
export function wholeNumber(
  given: Given,
  name: string,
  least: number,
  otherwise: number,
  command: Command,
): number {
  const text = given.options.get(name);
  if (text === undefined || text === true) return otherwise;
  const value = Number(text);
  if (/^\d+$/.test(text) && value >= least && Number.isSafeInteger(value)) return value;
  throw usage(`--${name} wants a whole number from ${least} on, not ${text}.`, command);
}
