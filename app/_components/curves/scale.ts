export type Scale = "linear" | "logarithmic";

/**
 * How values become places along an axis. A logarithmic axis holds values of one sign only: `sign` is −1 where all are
 * negative, and then −1 mV stands above −10 mV, as on a linear axis. Places on a linear axis are the values themselves, on a
 * logarithmic one sign·log10|value|.
 */
export interface Mapping {
  readonly scale: Scale;
  readonly sign: 1 | -1;
}

export const LINEAR: Mapping = { scale: "linear", sign: 1 };

/** The place of `value` on the axis; null where the axis has no such place. */
export function placeOf({ scale, sign }: Mapping, value: number): number | null {
  if (scale === "linear") return Number.isFinite(value) ? value : null;
  const size = sign * value;
  return size > 0 && Number.isFinite(size) ? sign * Math.log10(size) : null;
}

/** The value at a place; the inverse of `placeOf`. */
export function valueAt({ scale, sign }: Mapping, place: number): number {
  return scale === "linear" ? place : sign * 10 ** (sign * place);
}

/** What a set of values allows: one sign for a logarithmic axis, or the reason why there can be none. */
export type LogarithmicFit =
  | { readonly fits: true; readonly sign: 1 | -1; readonly decades: number }
  | { readonly fits: false; readonly reason: "no values" | "zero" | "both signs" | "one value" };

/** Whether the numbers among `values` may stand on a logarithmic axis, and over how many decades they reach. */
export function logarithmicFit(values: Iterable<number | null | undefined>): LogarithmicFit {
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (const value of values) {
    if (value === null || value === undefined || !Number.isFinite(value)) continue;
    if (value < low) low = value;
    if (value > high) high = value;
  }
  return fitOf(low, high);
}

/** What values from `low` to `high` allow; there are none where `low` is above `high`. */
export function fitOf(low: number, high: number): LogarithmicFit {
  if (low > high) return { fits: false, reason: "no values" };
  if (low < 0 && high > 0) return { fits: false, reason: "both signs" };
  if (low === 0 || high === 0) return { fits: false, reason: "zero" };
  if (low === high) return { fits: false, reason: "one value" };
  return low > 0
    ? { fits: true, sign: 1, decades: Math.log10(high / low) }
    : { fits: true, sign: -1, decades: Math.log10(low / high) };
}

const REASONS = {
  "no values": "there are no values",
  zero: "the values reach zero",
  "both signs": "the values have both signs",
  "one value": "all values are one",
} as const;

/** Why an axis is linear only, as the end of a sentence. */
export function reasonFor(fit: Extract<LogarithmicFit, { fits: false }>): string {
  return REASONS[fit.reason];
}
