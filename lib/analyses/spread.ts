/** What a requirement compares at one place, with its limits there: infinite on a side that has none. */
export interface Compared {
  readonly value: number;
  readonly low: number;
  readonly high: number;
}

/** The least and the most of what is compared; null where nothing is known. */
export interface Ends {
  readonly low: number | null;
  readonly high: number | null;
}

/**
 * The least and the most of what a requirement compares, over points and draws. Where its limits differ from point to point, each
 * value is moved to the limits of one place: by its distance to the limit, or in proportion where there are two.
 */
export class Spread {
  private plain: [number, number] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  private moved: [number, number] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  private first: Compared | null = null;
  private differs = false;

  /** A place whose value and limits are known. */
  add(compared: Compared): void {
    this.first ??= compared;
    this.differs ||= compared.low !== this.first.low || compared.high !== this.first.high;
    widen(this.plain, compared.value);
    widen(this.moved, placeWithin(compared));
  }

  /** The limits that hold at every place; null where they differ, or nothing is known. */
  get limits(): Compared | null {
    return this.differs ? null : this.first;
  }

  /** As the limits of `place` show it. */
  endsAt(place: Compared): Ends {
    if (this.first === null) return { low: null, high: null };
    const [low, high] = this.differs ? this.moved.map((one) => valueAt(place, one)) : this.plain;
    return { low: finite(low!), high: finite(high!) };
  }

  /** A value as the limits of `place` show it. */
  shownAt(place: Compared, compared: Compared): number | null {
    return finite(this.differs ? valueAt(place, placeWithin(compared)) : compared.value);
  }
}

function widen(ends: [number, number], value: number): void {
  if (value < ends[0]) ends[0] = value;
  if (value > ends[1]) ends[1] = value;
}

/** Between two limits: 0 at the lower, 1 at the upper. Beside one, or between two that are equal: the distance to it. */
function placeWithin({ value, low, high }: Compared): number {
  const width = high - low;
  return width > 0 && width < Number.POSITIVE_INFINITY
    ? (value - low) / width
    : value - limitOf({ low, high });
}

function valueAt({ low, high }: Compared, place: number): number {
  const width = high - low;
  return width > 0 && width < Number.POSITIVE_INFINITY ? low + place * width : limitOf({ low, high }) + place;
}

function limitOf({ low, high }: Pick<Compared, "low" | "high">): number {
  return Number.isFinite(low) ? low : Number.isFinite(high) ? high : 0;
}

/** Null in place of what is not known or endless, for JSON. */
export function finite(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}
