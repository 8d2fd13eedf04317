import { type Mapping, placeOf, valueAt } from "./scale";

/** A mark on an axis. Ranks as on a ruler: 0 the longest (a decade, a labelled step), 1 middling, 2 short. */
export interface Tick {
  readonly place: number;
  readonly value: number;
  readonly rank: 0 | 1 | 2;
  readonly labelled: boolean;
}

/** A step of 1, 2 or 5 times a power of ten that divides `span` into at most `most` parts. */
export function niceStep(span: number, most: number): number {
  const rough = span / Math.max(1, most);
  const power = 10 ** Math.floor(Math.log10(rough));
  for (const times of [1, 2, 5]) if (times * power >= rough * (1 - 1e-9)) return times * power;
  return 10 * power;
}

/** Whole multiples of `step` inside [from, to], without the crumbs of repeated addition. */
function multiples(from: number, to: number, step: number): number[] {
  const first = Math.ceil(from / step - 1e-9);
  const last = Math.floor(to / step + 1e-9);
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, i) => {
    const value = (first + i) * step;
    return value === 0 ? 0 : Number(value.toPrecision(12));
  });
}

/** Ticks of a linear axis over the places [from, to]: at most `most` labelled ones, each step cut into fifths or halves. */
export function linearTicks(from: number, to: number, most: number): Tick[] {
  if (!(to > from)) return [{ place: from, value: from, rank: 0, labelled: true }];
  const step = niceStep(to - from, most);
  const labelled = new Set(multiples(from, to, step));
  const leading = Math.round(step / 10 ** Math.floor(Math.log10(step) + 1e-9));
  const minor = step / (leading === 2 ? 4 : 5);
  return multiples(from, to, minor).map((value) => {
    const major = labelled.has(value);
    return { place: value, value, rank: major ? 0 : 2, labelled: major };
  });
}

/**
 * Ticks of a logarithmic axis over the places [from, to]: a long one each decade, one at five, short ones between. `most` labels
 * fit: where there are more decades, every second or third is numbered; below one and a half decades 2 and 5 are numbered too;
 * below a third of a decade the ruler is numbered in even steps, since it hardly holds a decade mark.
 */
export function decadeTicks(from: number, to: number, mapping: Mapping, most: number): Tick[] {
  const decades = to - from;
  if (decades < 0.34) return evenTicks(from, to, mapping, most);
  const [low, high] = mapping.sign === 1 ? [from, to] : [-to, -from];
  const stride = Math.max(1, Math.ceil(decades / Math.max(1, most)));
  const inner = decades < 1.5;
  const ticks: Tick[] = [];
  for (let decade = Math.floor(low + 1e-9); decade <= high + 1e-9; decade++) {
    for (let times = 1; times <= 9; times++) {
      const size = Number(`${times}e${decade}`);
      const place = Math.log10(size);
      if (place < low - 1e-9 || place > high + 1e-9) continue;
      const rank = times === 1 ? 0 : times === 5 ? 1 : 2;
      const labelled = times === 1 ? decade % stride === 0 : inner && (times === 2 || times === 5);
      ticks.push({ place: mapping.sign * place, value: mapping.sign * size, rank, labelled });
    }
  }
  return mapping.sign === 1 ? ticks : ticks.reverse();
}

function evenTicks(from: number, to: number, mapping: Mapping, most: number): Tick[] {
  const ticks = linearTicks(valueAt(mapping, from), valueAt(mapping, to), most);
  return ticks.flatMap((tick) => {
    const place = placeOf(mapping, tick.value);
    return place === null ? [] : [{ ...tick, place }];
  });
}

/** Ticks of any axis over the places [from, to]. */
export function ticksOf(from: number, to: number, mapping: Mapping, most: number): Tick[] {
  return mapping.scale === "linear" ? linearTicks(from, to, most) : decadeTicks(from, to, mapping, most);
}
