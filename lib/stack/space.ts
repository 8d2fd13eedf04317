import { statfsSync } from "node:fs";
import { Complaint } from "./complaint";

const MEBIBYTE = 2 ** 20;

/** Bytes that an ordinary user may still write in the file system of `folder`. */
export function freeBytes(folder: string): number {
  const { bavail, bsize } = statfsSync(folder);
  return bavail * bsize;
}

/** Complains when fewer than `mebibytes` are free, before anything is half made. */
export function requireSpace(folder: string, mebibytes: number, free = freeBytes(folder)): void {
  if (free >= mebibytes * MEBIBYTE) return;
  const left = Math.floor(free / MEBIBYTE);
  throw new Complaint(
    `The disk of ${folder} is nearly full: ${left} MiB are free and Sweepwright needs ${mebibytes} MiB. Free some space and start again.`,
  );
}
