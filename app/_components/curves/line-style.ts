import type { TraceToken } from "./theme-colours";

/** How a line is told from its neighbours: by colour and, for those who do not see it, by its dashes or its place in an order. */
export interface LineStyle {
  /** A token of the look (globals.css); its value follows the theme. */
  readonly colour: TraceToken;
  /** The colour lies so far, 0 to 1, on the way to another token. */
  readonly towards: { readonly colour: TraceToken; readonly share: number } | null;
  /** Lengths of dash and gap in px; empty for a whole line. */
  readonly dash: readonly number[];
}

const COLOURS = ["--trace-1", "--trace-2", "--trace-3", "--trace-4", "--trace-5", "--trace-6"] as const;
/** Each is told from the others in 14 px, the length of a sample beside a name. */
const DASHES = [[], [2, 3], [7, 4], [9, 2, 1, 2], [4, 2], [3, 2, 1, 2, 1, 2]] as const;
/** From cold to warm; each keeps 3:1 against the paper of both themes, and so does what lies between. */
const GRADE = ["--trace-1", "--trace-4", "--trace-2"] as const;

/** Points are marked one by one where a line has at most this many. */
export const FEW_POINTS = 24;

/** More lines than this are graded by their order: as many dash patterns could not be told apart. */
export const FEW_STYLES = DASHES.length;

/** The style of the line that is `colour`-th by colour and `dash`-th by dashes. */
export function styleOf(colour: number, dash: number): LineStyle {
  return {
    colour: COLOURS[colour % COLOURS.length]!,
    towards: null,
    dash: DASHES[dash % DASHES.length]!,
  };
}

/** The style of the k-th line where one number tells lines apart: 36 pairs before one comes again. */
export function styleInTurn(k: number): LineStyle {
  return styleOf(k, k + Math.floor(k / COLOURS.length));
}

/** The style of the k-th of `count` lines in an order: from cold to warm, so that a reader sees the order and follows labels. */
export function styleInOrder(k: number, count: number, dash = 0): LineStyle {
  const along = count < 2 ? 0 : ((GRADE.length - 1) * k) / (count - 1);
  const from = Math.min(GRADE.length - 2, Math.floor(along));
  const share = Math.round(100 * (along - from)) / 100;
  return {
    colour: GRADE[from]!,
    towards: share === 0 ? null : { colour: GRADE[from + 1]!, share },
    dash: DASHES[dash % DASHES.length]!,
  };
}

/** The colour of a line in a style sheet. */
export function cssColour({ colour, towards }: LineStyle): string {
  if (towards === null) return `var(${colour})`;
  return `color-mix(in srgb, var(${towards.colour}) ${Math.round(100 * towards.share)}%, var(${colour}))`;
}

/** The colour of a line as a canvas and a file need it, "#rrggbb", with the tokens' values given. */
export function inkOf({ colour, towards }: LineStyle, colours: Readonly<Record<TraceToken, string>>): string {
  const from = colours[colour];
  if (towards === null) return from;
  const channel = (hex: string, i: number) => Number.parseInt(hex.slice(1 + 2 * i, 3 + 2 * i), 16);
  const mixed = [0, 1, 2].map((i) => {
    const [a, b] = [channel(from, i), channel(colours[towards.colour], i)];
    return Math.round(a + towards.share * (b - a))
      .toString(16)
      .padStart(2, "0");
  });
  return `#${mixed.join("")}`;
}
