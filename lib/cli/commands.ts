import { EXIT } from "./exit-codes";
import type { Command, Option } from "./options";

const HELP: Option = { name: "help", takes: null, about: "say this" };
const QUIET: Option = { name: "quiet", takes: null, about: "no progress on stderr" };
const JUNIT: Option = { name: "junit", takes: "FILE", about: "write a JUnit XML report to FILE" };
const ANNOTATIONS: Option = {
  name: "annotations",
  takes: null,
  about: "print one line a problem, `file:line:column: severity code: message`, and nothing else",
};
const JSON_LINES: Option = {
  name: "json",
  takes: null,
  about: "print one JSON object a file, each on a line of its own, and nothing else",
};
const OUTPUT: Option = { name: "output", takes: "FILE", about: "write to FILE what would go to stdout" };

export const CHECK: Command = {
  name: "check",
  about: "read netlists and list what is wrong with their text and wiring; nothing is solved",
  options: [JSON_LINES, ANNOTATIONS, JUNIT, OUTPUT, HELP],
  notes: ["The JSON object of a file is { file, diagnostics }."],
};

export const RUN: Command = {
  name: "run",
  about: "solve every point of netlists and judge their requirements",
  options: [
    {
      name: "threads",
      takes: "N",
      about: "threads to solve on; as many as the machine has processors by default",
    },
    {
      name: "timeout",
      takes: "SECONDS",
      about: "give up, with code 5, after this time for all files together",
    },
    JSON_LINES,
    ANNOTATIONS,
    JUNIT,
    OUTPUT,
    QUIET,
    HELP,
  ],
  notes: [
    "The JSON object of a file is its run document, sweepwright-run/1; it is the same for any number of threads.",
    "A netlist with errors is not solved, and its document has its diagnostics and the verdict `no data`.",
  ],
};

export const FORMAT: Command = {
  name: "format",
  about: "bring netlists to their canonical form",
  options: [
    {
      name: "check",
      takes: null,
      about: "list the files that are not in it, and leave with code 1 if there are any",
    },
    { name: "write", takes: null, about: "rewrite those files, and list them" },
    OUTPUT,
    HELP,
  ],
  notes: ["Without --check or --write it takes one FILE and prints its canonical form."],
};

export const COMMANDS: readonly Command[] = [CHECK, RUN, FORMAT];

/** What a command takes; for the help and the reference. */
export const FILES =
  'FILE is a netlist; `-` is standard input. `use "NAME"` brings in NAME.swn from the folder of the file.';
/** What the program leaves with; for the help and the reference. */
export const CODES: readonly (readonly [code: number, means: string])[] = [
  [EXIT.holds, "everything holds"],
  [
    EXIT.broken,
    "a requirement broke or has no data, or points failed and nothing is required; a file is not canonical",
  ],
  [EXIT.usage, "the command was not understood, or a file is not there"],
  [EXIT.netlist, "a netlist has an error"],
  [EXIT.notAllowed, "a file may not be read or written"],
  [EXIT.service, "the engine broke down, or the time was up"],
  [EXIT.interrupted, "interrupted"],
];

/** The help of the program as a whole. */
export function overview(): string {
  return [
    "sweepwright: proves log-domain circuits over sweeps, temperature and tolerance.",
    "",
    "Use: sweepwright COMMAND [options] FILE…",
    "",
    ...COMMANDS.map(({ name, about }) => `  ${name.padEnd(8)}${about}`),
    "",
    "`sweepwright COMMAND --help` says more. It leaves with",
    ...CODES.map(([code, means]) => `  ${code}  ${means}`),
    "",
  ].join("\n");
}

export function helpOf({ name, about, options, notes }: Command): string {
  const spelled = options.map((one) => `--${one.name}${one.takes === null ? "" : ` ${one.takes}`}`);
  const width = Math.max(...spelled.map((text) => text.length));
  return [
    `sweepwright ${name} [options] FILE…`,
    "",
    `${about[0]!.toUpperCase()}${about.slice(1)}.`,
    FILES,
    "",
    ...options.map((one, k) => `  ${spelled[k]!.padEnd(width)}  ${one.about}`),
    "",
    ...notes,
    ...(notes.length === 0 ? [] : [""]),
  ].join("\n");
}
