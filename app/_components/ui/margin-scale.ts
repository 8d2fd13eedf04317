import type { RequirementDocument } from "@/lib/analyses/result";

/** Where the parts of a margin bar stand, in shares of its length, 0 to 1. */
export interface MarginPlaces {
  /** The allowed band; an end that is open reaches the end of the bar. */
  readonly allowed: { readonly from: number; readonly to: number };
  readonly isOpen: { readonly low: boolean; readonly high: boolean };
  /** Null where no value is known. */
  readonly spread: { readonly from: number; readonly to: number } | null;
  readonly worst: number | null;
  readonly nominal: number | null;
  /** Values that lie farther out than the bar reaches. */
  readonly beyond: { readonly low: boolean; readonly high: boolean };
}

/** Room left at each end of the bar, as a share of what it shows. */
const ROOM = 0.1;
/** A bar shows no more than so many widths of the allowed band beyond it, so that the band stays wide enough to see. */
const WIDTHS = 4;

/** Null where there are no limits to show. */
export function marginPlaces({
  allowed,
  value,
}: Pick<RequirementDocument, "allowed" | "value">): MarginPlaces | null {
  const limits = [allowed.low, allowed.high].filter((one) => one !== null);
  if (limits.length === 0) return null;
  const values = [value.low, value.high, value.worst, value.nominal].filter((one) => one !== null);
  const [least, most] = [Math.min(...limits, ...values), Math.max(...limits, ...values)];
  const width = limits.length === 2 ? limits[1]! - limits[0]! : Number.POSITIVE_INFINITY;
  const reach = width > 0 ? WIDTHS * width : Number.POSITIVE_INFINITY;
  const from = Math.max(least, limits[0]! - reach);
  const to = Math.min(most, limits.at(-1)! + reach);
  const room = ROOM * (to - from) || Math.abs(from) || 1;
  const [start, length] = [from - room, to - from + 2 * room];
  const place = (one: number) => Math.min(1, Math.max(0, (one - start) / length));
  const known = (one: number | null) => (one === null ? null : place(one));
  return {
    allowed: { from: known(allowed.low) ?? 0, to: known(allowed.high) ?? 1 },
    isOpen: { low: allowed.low === null, high: allowed.high === null },
    spread:
      value.low === null || value.high === null ? null : { from: place(value.low), to: place(value.high) },
    worst: known(value.worst),
    nominal: known(value.nominal),
    beyond: { low: least < from, high: most > to },
  };
}
