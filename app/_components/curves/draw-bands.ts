/** The draws of some columns: `length` points a setting, `families` settings a draw, draw 0 first. */
export interface Drawn {
  readonly length: number;
  readonly families: number;
  /** Random draws, which stand after the nominal one. */
  readonly draws: number;
}

/** The shares of the draws that lie below the lower and the upper edge of a band. */
export const BAND = { low: 0.05, high: 0.95 } as const;

/** Flat as the nominal part of the column is: NaN where no draw is solved. */
export interface Edges {
  readonly low: Float64Array;
  readonly high: Float64Array;
}

/**
 * The band of a column at every point of the nominal design: its 5th and 95th percentile over the random draws that are solved
 * there, by linear interpolation between order statistics (definition 7 of Hyndman and Fan, The American Statistician 50 (1996)
 * 361). A quarter of a million values take some 20 ms; callers in a page leave it to a thread.
 */
export function bandOf(values: Float64Array, { length, families, draws }: Drawn): Edges {
  const count = length * families;
  const low = new Float64Array(count).fill(Number.NaN);
  const high = new Float64Array(count).fill(Number.NaN);
  const sample = new Float64Array(draws);
  for (let point = 0; point < count; point++) {
    let solved = 0;
    for (let draw = 1; draw <= draws; draw++) {
      const value = values[draw * count + point]!;
      if (value - value === 0) sample[solved++] = value;
    }
    if (solved === 0) continue;
    const sorted = sample.subarray(0, solved).sort();
    low[point] = quantile(sorted, BAND.low);
    high[point] = quantile(sorted, BAND.high);
  }
  return { low, high };
}

/** Of an ascending sample. */
function quantile(sorted: Float64Array, share: number): number {
  const at = share * (sorted.length - 1);
  const below = Math.floor(at);
  const a = sorted[below]!;
  return below + 1 < sorted.length ? a + (at - below) * (sorted[below + 1]! - a) : a;
}
