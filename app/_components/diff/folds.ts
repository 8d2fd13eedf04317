import type { DiffRow } from "./line-diff";

/** A stretch of rows: shown, or folded away because nothing changed there. `from` counts rows. */
export interface Stretch {
  readonly from: number;
  readonly to: number;
  readonly isFolded: boolean;
}

/** Rows around a change that stay in view. */
const AROUND = 3;
/** Fewer rows than this are not worth a fold. */
const LEAST = 4;

/** Cuts rows into what is shown and what is folded. Without any change nothing is folded. */
export function foldsOf(rows: readonly DiffRow[]): Stretch[] {
  const isShown = new Uint8Array(rows.length);
  rows.forEach(({ isSame }, index) => {
    if (!isSame) isShown.fill(1, Math.max(0, index - AROUND), index + AROUND + 1);
  });
  if (!isShown.includes(1)) return rows.length === 0 ? [] : [{ from: 0, to: rows.length, isFolded: false }];
  const stretches: Stretch[] = [];
  for (let from = 0; from < rows.length; ) {
    let to = from;
    while (to < rows.length && isShown[to] === isShown[from]) to += 1;
    const isFolded = isShown[from] === 0 && to - from >= LEAST;
    const last = stretches.at(-1);
    if (!isFolded && last !== undefined && !last.isFolded) stretches[stretches.length - 1] = { ...last, to };
    else stretches.push({ from, to, isFolded });
    from = to;
  }
  return stretches;
}

/** The first row of each change: neighbouring rows that are not the same in both texts. */
export function changesIn(rows: readonly DiffRow[]): number[] {
  return rows.flatMap(({ isSame }, index) => (!isSame && rows[index - 1]?.isSame !== false ? [index] : []));
}
