/** What a netlist may ask for; beyond it the answer is one CAP diagnostic, at once. */

/** How large a circuit may be: by its text, in UTF-16 units, by its elements, and by the words and values that blocks unfold to. */
export interface Size {
  readonly text: number;
  readonly elements: number;
  readonly unfolded: number;
}

/** What anyone may ask of a machine that all share, and of a page. */
export const SHARED: Size = { text: 262_144, elements: 2_000, unfolded: 30_000 };
/** What one may ask of one's own machine: a ladder of ten thousand sections is read in seconds. */
export const OWN: Size = { text: 4_194_304, elements: 50_000, unfolded: 500_000 };

/** UTF-16 units of text. */
export const MOST_TEXT = SHARED.text;
/** UTF-16 units of a word: blocks within blocks put names before names, so that long ones would multiply. */
export const MOST_WORD = 128;
/** Brackets within brackets, and links in a chain such as a + b + c. */
export const MOST_DEPTH = 256;
/** Blocks within blocks. */
export const MOST_BLOCK_DEPTH = 16;
/** UTF-16 units of all shelves that are fetched for a file, and what each counts for at least. */
export const MOST_SHELF_TEXT = 2_097_152;
export const LEAST_SHELF_TEXT = 4_096;
/** Product of the lengths of all sweeps. */
export const MOST_POINTS = 1_000_000;
/** Operating points looked for at each setting. */
export const MOST_BRANCHES = 32;
/** What `seek` goes through: sweeps of the first knob, their points together, and unknowns of the circuit. */
export const MOST_SOUGHT_SWEEPS = 1_000;
export const MOST_SOUGHT_POINTS = 100_000;
export const MOST_SOUGHT_UNKNOWNS = 100;
/** Readings and requirements. */
export const MOST_CONTRACT = 1_000;
/** Points × (traces + unknowns), and points × (names, numbers and operators of readings and requirements). */
export const MOST_VALUES = 50_000_000;

/** A count with narrow no-break spaces between groups of three, for messages. */
export function count(n: number): string {
  return String(n).replace(/\B(?=(\d{3})+$)/gu, "\u202f");
}
