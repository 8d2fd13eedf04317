/** A netlist as the pages of its revisions know it. */
export interface NetlistFacts {
  readonly id: string;
  readonly number: number;
  readonly title: string;
  /** The newest revision and the hash of its text. */
  readonly latest: number;
  readonly latestHash: string;
}

/** One revision whole. */
export interface RevisionFacts {
  readonly number: number;
  readonly hash: string;
  readonly text: string;
  readonly message: string | null;
  readonly author: string;
  /** ISO 8601. */
  readonly savedAt: string;
}
