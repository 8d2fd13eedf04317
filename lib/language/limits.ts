/** What a netlist may ask for; beyond it the answer is one CAP diagnostic, at once. */

/** UTF-16 units of text. */
export const MOST_TEXT = 262_144;
/** UTF-16 units of a word: blocks within blocks put names before names, so that long ones would multiply. */
export const MOST_WORD = 128;
/** Brackets within brackets, and links in a chain such as a + b + c. */
export const MOST_DEPTH = 256;
/** Blocks within blocks. */
export const MOST_BLOCK_DEPTH = 16;
/** Words and values that the instances of blocks may unfold to. */
export const MOST_UNFOLDED = 30_000;
/** UTF-16 units of all shelves that are fetched for a file, and what each counts for at least. */
export const MOST_SHELF_TEXT = 2_097_152;
export const LEAST_SHELF_TEXT = 4_096;
export const MOST_ELEMENTS = 2_000;
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
