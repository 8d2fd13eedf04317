const BETWEEN = /(?<=\d) (?=(?:[fpnµmkMG]?(?:A|V|Ω|W|S|s)|K|°C|%|ppm\/K|dB)(?:\/(?:K|V|A))?(?![\p{L}\d]))/gu;

/** A sentence in which no line begins with the unit of a number on the line before. */
export function wholeQuantities(sentence: string): string {
  return sentence.replace(BETWEEN, "\u00a0");
}
