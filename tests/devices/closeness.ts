/** |actual − wanted| / |wanted|; 0 where both are 0. */
export function relativeError(actual: number, wanted: number): number {
  return actual === wanted ? 0 : Math.abs(actual - wanted) / Math.abs(wanted);
}

/** The largest relative error over rows, with the row, so that a failure shows where it lies. */
export function worst<Row>(rows: readonly Row[], errorOf: (row: Row) => number): { error: number; row: Row } {
  let found = { error: 0, row: rows[0] as Row };
  for (const row of rows) {
    const error = errorOf(row);
    if (!(error <= found.error)) found = { error, row };
  }
  return found;
}
