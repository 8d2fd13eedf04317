/** Limits of a value; null on a side without one. */
export interface Limits {
  readonly low: number | null;
  readonly high: number | null;
}

export interface Bin {
  readonly from: number;
  readonly to: number;
  readonly count: number;
  /** It lies outside the limits: no value in it is allowed. */
  readonly isOutside: boolean;
}

export interface Histogram {
  readonly bins: readonly Bin[];
  readonly most: number;
  /** Values found, and draws without one. */
  readonly known: number;
  readonly unknown: number;
  /** Values beyond a limit; one that stands on it is within. */
  readonly outside: number;
}

/** Bins at least and at most. */
const FEW = 5;
const MANY = 40;

/**
 * Counts values in bins of one width, about 1.5·√n of them. A limit among the values is an edge of bins, both where there are two,
 * so that no bin is partly allowed. Null without values.
 */
export function histogram(values: readonly (number | null)[], limits: Limits): Histogram | null {
  const found = values.filter((value) => value !== null);
  if (found.length === 0) return null;
  const least = found.reduce((a, b) => Math.min(a, b));
  const most = found.reduce((a, b) => Math.max(a, b));
  const { start, width, count } = edges(least, most, limits, found.length);
  const counts = new Array<number>(count).fill(0);
  for (const value of found) counts[binOf(value, start, width, count, limits)]!++;
  const outside = found.filter(
    (value) => value < (limits.low ?? value) || value > (limits.high ?? value),
  ).length;
  const slack = 1e-9 * width;
  const bins = counts.map((one, i) => {
    const [from, to] = [start + i * width, start + (i + 1) * width];
    const isOutside =
      (limits.low !== null && to <= limits.low + slack) ||
      (limits.high !== null && from >= limits.high - slack);
    return { from, to, count: one, isOutside };
  });
  return {
    bins,
    most: counts.reduce((a, b) => Math.max(a, b)),
    known: found.length,
    unknown: values.length - found.length,
    outside,
  };
}

function edges(least: number, most: number, { low, high }: Limits, n: number) {
  const length = most - least;
  if (!(length > Math.max(1e-12 * Math.abs(least), 1e-12 * Math.abs(most), 1e-290))) {
    const width = Math.abs(least) * 1e-3 || 1;
    return { start: least - width / 2, width, count: 1 };
  }
  const wanted = Math.min(MANY, Math.max(FEW, Math.round(1.5 * Math.sqrt(n))));
  // A limit at an end counts where a value on it and one beyond it would share a bin.
  const inside = [
    ...(low !== null && low > least && low <= most ? [low] : []),
    ...(high !== null && high >= least && high < most ? [high] : []),
  ];
  const [edge, other] = inside;
  if (edge === undefined) return { start: least, width: length / wanted, count: wanted };
  let width = length / wanted;
  const apart = other === undefined ? 0 : other - edge;
  // Limits that lie closer together than bins can be narrow share one.
  if (apart > length / (2 * MANY)) width = apart / Math.ceil(apart / width);
  const below = Math.max(edge === high ? 1 : 0, Math.ceil((edge - least) / width - 1e-9));
  const start = edge - below * width;
  return { start, width, count: Math.max(below + 1, Math.ceil((most - start) / width - 1e-9)) };
}

/** A value on an upper edge belongs to the bin above, unless the edge is the upper limit, on which it is still allowed. */
function binOf(value: number, start: number, width: number, count: number, { low, high }: Limits): number {
  const bin = Math.min(count - 1, Math.max(0, Math.floor((value - start) / width + 1e-9)));
  if (high !== null && value <= high && start + bin * width >= high - 1e-9 * width)
    return Math.max(0, bin - 1);
  if (low !== null && value < low && start + bin * width >= low - 1e-9 * width) return Math.max(0, bin - 1);
  return bin;
}
