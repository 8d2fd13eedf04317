import { formatAxis } from "@/lib/units/quantity";

const NARROW = "\u202f";

/**
 * Values of one unit written with one prefix, that of the largest, and as many decimals as leave `digits` significant digits to the
 * largest: 0.995 V and 1.005 V, not 995 mV and 1.005 V. The unit stands apart; a unit that takes no prefix comes as it is.
 */
export function onePrefix(
  values: readonly number[],
  unit: string,
  digits: number,
  /** Zeros at the end stay, so that columns of figures line up. */
  isFixed = false,
): { readonly texts: readonly string[]; readonly unit: string } {
  const largest = values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
  if (largest === 0) return { texts: values.map(() => "0"), unit: unit === "1" ? "" : unit };
  // Rounding may lift the largest into the next prefix: 999.9996 µV is 1 mV.
  const rounded = Number(largest.toPrecision(digits));
  const power = 3 * Math.floor(Math.log10(rounded) / 3 + 1e-9);
  const [one, prefixed] = formatAxis(Number(`1e${power}`), unit).split(NARROW);
  if (one !== "1" || prefixed === undefined) {
    const own = unit === "1" ? "" : unit;
    const texts = values.map((value) => formatAxis(Number(value.toPrecision(digits)), "1"));
    return { texts, unit: own };
  }
  const whole = Math.floor(Math.log10(rounded / 10 ** power) + 1e-9) + 1;
  const decimals = Math.max(0, digits - whole);
  const texts = values.map((value) => plain((value / 10 ** power).toFixed(decimals), isFixed));
  return { texts, unit: prefixed };
}

/** "0.995 to 1.005 V". */
export function spanInWords(low: number, high: number, unit: string, digits: number): string {
  const { texts, unit: shared } = onePrefix([low, high], unit, digits);
  return `${texts[0]} to ${texts[1]}${shared === "" ? "" : NARROW}${shared}`;
}

/** Without zeros at the end unless they are to stay, and with a proper minus sign; no zero has a sign. */
function plain(text: string, isFixed: boolean): string {
  const short = text.includes(".") && !isFixed ? text.replace(/\.?0+$/, "") : text;
  return short === "-0" ? "0" : short.replace("-", "\u2212");
}
