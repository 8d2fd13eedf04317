/** SI prefixes as powers of ten (SI Brochure, 9th ed., table 7, with the 2022 additions), case-sensitive. */
export const PREFIXES: ReadonlyMap<string, number> = new Map([
  ["Q", 30],
  ["R", 27],
  ["Y", 24],
  ["Z", 21],
  ["E", 18],
  ["P", 15],
  ["T", 12],
  ["G", 9],
  ["M", 6],
  ["k", 3],
  ["h", 2],
  ["da", 1],
  ["d", -1],
  ["c", -2],
  ["m", -3],
  ["µ", -6],
  ["n", -9],
  ["p", -12],
  ["f", -15],
  ["a", -18],
  ["z", -21],
  ["y", -24],
  ["r", -27],
  ["q", -30],
]);

/** The prefix of 10^power where a quantity is shown; only steps of three are used. */
export const ENGINEERING: ReadonlyMap<number, string> = new Map([
  [0, ""],
  ...[...PREFIXES].filter(([, power]) => power % 3 === 0).map(([prefix, power]) => [power, prefix] as const),
]);
