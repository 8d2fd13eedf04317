const STEPS = "▁▂▃▄▅▆▇█";

/**
 * A curve in one line of at most `width` characters: the mean of each stretch of points on a scale from the lowest to the highest
 * value. A stretch without a solved point is a gap; a level curve lies low.
 */
export function sparkline(values: readonly (number | null)[], width: number): string {
  const cells = Math.min(width, values.length);
  const means = Array.from({ length: cells }, (_, cell) => {
    const from = Math.floor((cell * values.length) / cells);
    const to = Math.floor(((cell + 1) * values.length) / cells);
    const known = values.slice(from, to).filter((value) => value !== null);
    return known.length === 0 ? null : known.reduce((sum, value) => sum + value / known.length, 0);
  });
  const known = means.filter((mean) => mean !== null);
  const low = Math.min(...known);
  const reach = Math.max(...known) - low;
  return means
    .map((mean) => {
      if (mean === null) return " ";
      return STEPS[reach > 0 ? Math.min(7, Math.floor(((mean - low) / reach) * 8)) : 0];
    })
    .join("");
}
