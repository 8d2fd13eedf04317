/** Something that the person at the terminal can mend. Its message is all that is shown: what, where, and how to mend it. */
export class Complaint extends Error {}

/** System errors that have a plain cause. `where` is a path, when the error names one. */
const CAUSES: Readonly<Record<string, (where: string) => string>> = {
  ENOSPC: (where) => `The disk is full${where}. Free some space and start again.`,
  EDQUOT: (where) => `The quota of this user is used up${where}. Free some space and start again.`,
  EACCES: (where) =>
    `This user may not write there${where}. Give it the right, or set SWEEPWRIGHT_DATA to another folder.`,
  EROFS: (where) =>
    `The file system can only be read${where}. Set SWEEPWRIGHT_DATA to a folder that can be written.`,
  EMFILE: () => "Too many files are open. Raise the limit (ulimit -n) and start again.",
};

/** What to print for an error: a sentence for what a person can mend, the whole error for a fault of our own. */
export function explain(error: unknown): string {
  if (error instanceof Complaint) return error.message;
  if (!(error instanceof Error)) return String(error);
  const { code, path } = error as NodeJS.ErrnoException;
  const cause = code === undefined ? undefined : CAUSES[code];
  return cause === undefined ? (error.stack ?? error.message) : cause(path === undefined ? "" : ` (${path})`);
}

/** The sentence for a command's output that tells of a full disk; null when it tells of something else. */
export function fullDisk(text: string, where: string): string | null {
  return /ENOSPC|No space left on device/i.test(text)
    ? `The disk is full (${where}). Free some space and start again.`
    : null;
}
