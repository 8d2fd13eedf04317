import { type Paint, tabulate } from "./style";

/** A blank line, a faint heading and rows; nothing where there is only the heading. */
export function section(paint: Paint, rows: readonly (readonly string[])[]): string[] {
  if (rows.length < 2) return [];
  const [head, ...lines] = tabulate(rows);
  return ["", paint("faint", head!), ...lines];
}
