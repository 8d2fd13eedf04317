import type { TokenClass } from "@/lib/language/highlight";

/** The colour token (globals.css) of each class of text; what is not named stands in plain ink. */
export const TOKEN_INKS: Partial<Record<TokenClass, string>> = {
  keyword: "--syntax-keyword",
  kind: "--syntax-kind",
  number: "--syntax-number",
  unit: "--syntax-number",
  comment: "--syntax-comment",
};

/** Metrics that the editor and the text shown before it share, in CSS pixels, so that nothing moves when it arrives. */
export const LINE_HEIGHT = 24;
export const FONT_SIZE = 13.5;
export const FONT_FAMILY =
  '"Spline Sans Mono Variable", "Figures Stand-in", "DejaVu Sans Mono", Menlo, Consolas, monospace';
