/** How a line is told from its neighbours: by colour and, for those who do not see it, by its dashes. */
export interface LineStyle {
  /** Name of a token of the look (globals.css); its value follows the theme. */
  readonly colour: `--trace-${1 | 2 | 3 | 4 | 5 | 6}`;
  /** Lengths of dash and gap in px; empty for a whole line. */
  readonly dash: readonly number[];
}

const COLOURS = ["--trace-1", "--trace-2", "--trace-3", "--trace-4", "--trace-5", "--trace-6"] as const;
const DASHES = [[], [2, 3], [7, 4], [11, 3, 2, 3], [4, 2], [14, 5]] as const;

/** Points are marked one by one where a line has at most this many. */
export const FEW_POINTS = 24;

/** The style of the line that is `colour`-th by colour and `dash`-th by dashes. */
export function styleOf(colour: number, dash: number): LineStyle {
  return { colour: COLOURS[colour % COLOURS.length]!, dash: DASHES[dash % DASHES.length]! };
}

/** The style of the k-th line where one number tells lines apart: 36 pairs before one comes again. */
export function styleInTurn(k: number): LineStyle {
  return styleOf(k, k + Math.floor(k / COLOURS.length));
}
