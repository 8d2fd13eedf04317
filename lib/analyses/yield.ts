/** The share of draws in which a requirement holds, with its interval of 95 % confidence. */
export interface Yield {
  readonly holds: number;
  readonly of: number;
  readonly low: number;
  readonly high: number;
}

const CONFIDENCE = 0.95;

/**
 * The interval of Clopper and Pearson (Biometrika 26, 1934, 404): the shares under which as many holding draws, or fewer, and as
 * many or more, are no less likely than (1 − confidence)/2. `of` is at least 1.
 */
export function yieldOf(holds: number, of: number): Yield {
  const tail = (1 - CONFIDENCE) / 2;
  const low = holds === 0 ? 0 : betaQuantile(tail, holds, of - holds + 1);
  const high = holds === of ? 1 : betaQuantile(1 - tail, holds + 1, of - holds);
  return { holds, of, low, high };
}

/** x at which the regularised incomplete beta function I_x(a, b) is p, by bisection to the last bit but a few. */
export function betaQuantile(p: number, a: number, b: number): number {
  let low = 0;
  let high = 1;
  for (let step = 0; step < 1100 && high - low > 2 ** -52 * high; step++) {
    const middle = (low + high) / 2;
    if (incompleteBeta(middle, a, b) < p) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/**
 * I_x(a, b) for 0 ≤ x ≤ 1, a and b above 0, by its continued fraction (Abramowitz and Stegun 26.5.8) with the algorithm of Lentz
 * (Applied Optics 15, 1976, 668) as Thompson and Barnett changed it. Relative error below 1e-9 for a + b up to 1e6, where ln Γ loses digits.
 */
export function incompleteBeta(x: number, a: number, b: number): number {
  if (x <= 0) return 0;
  if (x >= 1) return 1;
  if (x > (a + 1) / (a + b + 2)) return 1 - incompleteBeta(1 - x, b, a);
  const front = Math.exp(a * Math.log(x) + b * Math.log1p(-x) - logBeta(a, b)) / a;
  return front / fractionOf(x, a, b);
}

const TINY = 1e-300;
const MOST_TERMS = 20_000;

function fractionOf(x: number, a: number, b: number): number {
  let c = 1;
  let d = 0;
  let value = 1;
  for (let term = 1; term < MOST_TERMS; term++) {
    const m = term >> 1;
    const numerator =
      term % 2 === 0
        ? (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m))
        : (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / nonZero(1 + numerator * d);
    c = nonZero(1 + numerator / c);
    const factor = c * d;
    value *= factor;
    if (Math.abs(factor - 1) < 1e-16) break;
  }
  return value;
}

function nonZero(x: number): number {
  return Math.abs(x) < TINY ? TINY : x;
}

function logBeta(a: number, b: number): number {
  return logGamma(a) + logGamma(b) - logGamma(a + b);
}

/** Coefficients B_2k/(2k(2k − 1)) of Stirling's series (Abramowitz and Stegun 6.1.41). */
const STIRLING = [1 / 12, -1 / 360, 1 / 1260, -1 / 1680, 1 / 1188, -691 / 360360, 1 / 156];

/** ln Γ(x) for x > 0, by Stirling's series from 16 on, led there by Γ(x + 1) = x·Γ(x). */
function logGamma(x: number): number {
  let shift = 0;
  let y = x;
  while (y < 16) {
    shift += Math.log(y);
    y += 1;
  }
  let series = 0;
  for (let k = STIRLING.length - 1; k >= 0; k--) series = series / (y * y) + STIRLING[k]!;
  return (y - 0.5) * Math.log(y) - y + 0.5 * Math.log(2 * Math.PI) + series / y - shift;
}
