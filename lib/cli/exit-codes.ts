/** What the process answers to its caller; of several files the gravest counts. */
export const EXIT = {
  /** Every requirement holds; a check or a format found nothing. */
  holds: 0,
  /** A requirement broke or had no data; a file is not in its canonical form. */
  broken: 1,
  /** The command was not understood, or a file that it names is not there. */
  usage: 2,
  /** A netlist has an error. */
  netlist: 3,
  /** A file may not be read or written. */
  notAllowed: 4,
  /** The engine broke down, or the time given has passed. */
  service: 5,
  interrupted: 130,
} as const;

export type ExitCode = (typeof EXIT)[keyof typeof EXIT];

const GRAVITY: readonly ExitCode[] = [
  EXIT.holds,
  EXIT.broken,
  EXIT.netlist,
  EXIT.usage,
  EXIT.notAllowed,
  EXIT.service,
  EXIT.interrupted,
];

export function gravest(codes: readonly ExitCode[]): ExitCode {
  return codes.reduce<ExitCode>(
    (worst, code) => (GRAVITY.indexOf(code) > GRAVITY.indexOf(worst) ? code : worst),
    0,
  );
}

/** Ends the command: a sentence for stderr and the code to leave with. */
export class Refusal extends Error {
  constructor(
    message: string,
    readonly code: ExitCode,
  ) {
    super(message);
  }
}
