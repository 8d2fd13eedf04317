/** Names longer than this are not compared. */
const LONGEST = 40;
/** Candidates of a fitting length that are compared; a file with more names than this is not searched further. */
const MOST_COMPARED = 2000;

/** Letters after which a name counts as one that is left unfinished: `temp`. */
const LEAST_BEGUN = 4;

/**
 * The candidate nearest to `name` by the edits that typing makes (a letter changed, left out, put in, or two exchanged: Damerau
 * 1964), else the only one that begins with it, or null where none is meant. Letters that differ only in case count half.
 */
export function nearest(name: string, candidates: Iterable<string>): string | null {
  if (name.length > LONGEST) return null;
  let best: string | null = null;
  let bound = [0, 0.5, 1][name.length] ?? Math.min(2.5, 0.5 + name.length / 3);
  let compared = 0;
  let begun: string | null = null;
  let isOne = true;
  for (const candidate of candidates) {
    if (name.length >= LEAST_BEGUN && candidate.startsWith(name) && candidate.length > name.length) {
      isOne &&= begun === null || begun === candidate;
      begun = candidate;
    }
    if (candidate.length > LONGEST || Math.abs(candidate.length - name.length) > bound) continue;
    if (compared++ >= MOST_COMPARED) break;
    const distance = editDistance(name, candidate, bound);
    if (distance > 0 && distance <= bound && (best === null || distance < bound)) {
      best = candidate;
      bound = distance;
    }
  }
  return best ?? (isOne ? begun : null);
}

/** The distance, or infinity once it must be above `bound`. What both begin and end with is left out. */
function editDistance(first: string, second: string, bound: number): number {
  const shorter = Math.min(first.length, second.length);
  let from = 0;
  while (from < shorter && first[from] === second[from]) from += 1;
  let end = 0;
  while (end < shorter - from && first.at(-1 - end) === second.at(-1 - end)) end += 1;
  const a = first.slice(from, first.length - end);
  const b = second.slice(from, second.length - end);
  let beforeLast: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const exchange =
        i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]
          ? beforeLast[j - 2]! + 1
          : Number.POSITIVE_INFINITY;
      row.push(
        Math.min(last[j]! + 1, row[j - 1]! + 1, last[j - 1]! + costOf(a[i - 1]!, b[j - 1]!), exchange),
      );
    }
    if (Math.min(...row) > bound + 1) return Number.POSITIVE_INFINITY;
    beforeLast = last;
    last = row;
  }
  return last[b.length]!;
}

function costOf(a: string, b: string): number {
  if (a === b) return 0;
  return a.toLowerCase() === b.toLowerCase() ? 0.5 : 1;
}
