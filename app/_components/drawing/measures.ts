import type { Box } from "@/lib/language/symbols/connections";

/** Lengths of the drawing in its own units, which are CSS pixels at a zoom of one. */
export const MARGIN = 16;
export const CHIP_HEIGHT = 38;
/** From one pin to the next on the same side of a chip. */
export const PIN_STEP = 18;
/** From the edge of a chip to the nearest rail; a piece of the ground rail stands within it. */
export const LEAD = 26;
export const GROUND_STUB = 16;
export const ROW_GAP = 12;
/** Above a row in which a rail begins, for its name. */
export const LABEL_HEIGHT = 20;
export const FRAME_HEAD = 28;
export const FRAME_PAD = 12;
/** Room for the button that opens a block. */
export const OPENER = 26;

/** Width of a letter of each size of the figures' font. */
const NAME_LETTER = 7.9;
const SMALL_LETTER = 7;

export function labelWidth(net: string): number {
  return net.length * SMALL_LETTER + 8;
}

/** What stands under the name of a chip. */
export function saidOf({ of, value }: Box): string {
  return value === "" ? of : `${of} ${value}`;
}

/** Width of the names of pins at one edge of a chip. */
export function pinsWidth(names: readonly string[]): number {
  return Math.max(0, ...names.map((name) => name.length * SMALL_LETTER + 8));
}

export function chipWidth(box: Box, left: readonly string[], right: readonly string[]): number {
  const own = box.name.slice(box.name.lastIndexOf(".") + 1);
  const words = Math.max(own.length * NAME_LETTER, saidOf(box).length * SMALL_LETTER);
  const opener = box.inside === null ? 0 : OPENER;
  return Math.ceil(Math.max(words + 20 + opener + pinsWidth(left) + pinsWidth(right), 56));
}

export function chipHeight(left: number, right: number): number {
  return Math.max(CHIP_HEIGHT, Math.max(left, right) * PIN_STEP + 6);
}
