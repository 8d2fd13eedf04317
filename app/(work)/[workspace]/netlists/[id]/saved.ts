/** The revision that the text on the sheet was written upon. */
export interface Saved {
  readonly title: string;
  readonly text: string;
  readonly revision: number;
  readonly hash: string;
}

/** A hash as people compare it. */
export function shortHash(hash: string): string {
  return hash.slice(0, 8);
}
