import type { SweepSummary } from "@/app/_components/editor/examine";

/** A mark on the ruler: its place from 0 (the first value) to 1 (the last), and its length in pixels. */
export interface Tick {
  readonly at: number;
  readonly length: number;
}

/** What a sweep's ruler shows; `decades` is how many the sweep crosses, null on a linear ruler. */
export interface Ruler {
  readonly ticks: readonly Tick[];
  readonly points: readonly number[];
  readonly decades: number | null;
}

const DECADE = 12;
const FIVE = 8;
const MINOR = 5;
/** Beyond this many decades the small ticks would run together. */
const MOST_MINOR = 16;

/** The engraving under a sweep. A list of positive values over more than a decade stands on a logarithmic ruler too. */
export function rulerTicks({ scale, values }: SweepSummary): Ruler {
  const low = Math.min(...values);
  const high = Math.max(...values);
  const reversed = (values[0] ?? 0) > (values.at(-1) ?? 0);
  const logarithmic = scale === "logarithmic" || (scale === "list" && low > 0 && high / low >= 10);
  const turn = logarithmic ? Math.log10 : (value: number) => value;
  const span = turn(high) - turn(low);
  const place = (value: number) => {
    const at = span > 0 ? (turn(value) - turn(low)) / span : 0;
    return reversed ? 1 - at : at;
  };
  const ticks = logarithmic && span > 0 ? decadeTicks(low, high, span, place) : evenTicks();
  return { ticks, points: values.map(place), decades: logarithmic ? span : null };
}

function decadeTicks(low: number, high: number, span: number, place: (value: number) => number): Tick[] {
  const ticks: Tick[] = [];
  // A hair of room, so that a decade that is an end of the sweep is not lost to rounding.
  const within = (value: number) => value >= low * (1 - 1e-9) && value <= high * (1 + 1e-9);
  for (let decade = Math.floor(Math.log10(low)); decade <= Math.ceil(Math.log10(high)); decade += 1) {
    for (let m = 1; m <= (span > MOST_MINOR ? 1 : 9); m += 1) {
      const value = m * 10 ** decade;
      if (within(value)) ticks.push({ at: place(value), length: m === 1 ? DECADE : m === 5 ? FIVE : MINOR });
    }
  }
  return ticks;
}

function evenTicks(): Tick[] {
  return Array.from({ length: 11 }, (_, i) => ({
    at: i / 10,
    length: i % 10 === 0 ? DECADE : i === 5 ? FIVE : MINOR,
  }));
}
