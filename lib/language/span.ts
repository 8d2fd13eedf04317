/** A half-open range of UTF-16 offsets in the netlist text. Lines and columns are derived, never stored. */
export interface Span {
  readonly from: number;
  readonly to: number;
}

/** Line and column of an offset, both counted from 1; a line ends at "\n". */
export interface Place {
  readonly line: number;
  readonly column: number;
}

/** Offsets at which each line of the text begins (first entry 0), for `placeOf`. */
export function lineStarts(text: string): number[] {
  const starts = [0];
  for (let at = text.indexOf("\n"); at !== -1; at = text.indexOf("\n", at + 1)) starts.push(at + 1);
  return starts;
}

/** The place of `offset`, by bisection over `starts` as made by `lineStarts`. */
export function placeOf(starts: readonly number[], offset: number): Place {
  let low = 0;
  let high = starts.length - 1;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if (starts[middle]! <= offset) low = middle;
    else high = middle - 1;
  }
  return { line: low + 1, column: offset - starts[low]! + 1 };
}
