/** A label that wants to stand at `at`, px from the top. */
export interface Wish {
  readonly key: string;
  readonly at: number;
}

/**
 * Places for labels along one edge of `height` px so that neighbours are at least `gap` px apart, in the order of their wishes
 * and each as near to its wish as that allows. Where not all fit, evenly chosen ones are placed, the first and the last among them,
 * and that of the key `kept` in place of its nearest.
 */
export function placeLabels(
  wishes: readonly Wish[],
  height: number,
  gap: number,
  kept: string | null = null,
): Map<string, number> {
  const room = Math.max(1, Math.floor(height / gap) + 1);
  const sorted = wishes.toSorted((a, b) => a.at - b.at);
  const chosen = sorted.length <= room ? sorted : withKept(spread(sorted, room), sorted, kept);
  const places: number[] = [];
  for (const { at } of chosen)
    places.push(Math.max(at, 0, (places.at(-1) ?? Number.NEGATIVE_INFINITY) + gap));
  let limit = height;
  for (let i = places.length - 1; i >= 0; i--) {
    places[i] = Math.min(places[i]!, limit);
    limit = places[i]! - gap;
  }
  return new Map(chosen.map(({ key }, i) => [key, places[i]!]));
}

function spread<T>(items: readonly T[], count: number): T[] {
  if (count === 1) return items.slice(0, 1);
  return Array.from({ length: count }, (_, i) => items[Math.round((i * (items.length - 1)) / (count - 1))]!);
}

function withKept(chosen: Wish[], all: readonly Wish[], kept: string | null): Wish[] {
  const wanted = all.find(({ key }) => key === kept);
  if (wanted === undefined || chosen.includes(wanted)) return chosen;
  const far = chosen.map(({ at }) => Math.abs(at - wanted.at));
  return chosen.with(far.indexOf(Math.min(...far)), wanted).sort((a, b) => a.at - b.at);
}
