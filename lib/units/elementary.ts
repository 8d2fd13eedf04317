import { exp, expm1 } from "./exponential";

/*
 * Elementary functions in plain arithmetic. The engines of browsers and servers have functions of their own that differ in the last
 * bit from version to version; these give the same bytes everywhere, so that a preview equals the run that a worker solves. Errors
 * are below 1.5 units in the last place but where said otherwise.
 */

/** ln 2 in two parts; the high one has 32 bits, so that its product with an exponent is exact. */
const LN2_HIGH = 0.6931471803691238;
const LN2_LOW = 1.9082149292705877e-10;
/** 1/ln 10 in two parts. */
const LOG10_E_HIGH = Math.LOG10E;
const LOG10_E_LOW = 1.098319650216765e-17;
const SUBNORMAL = 2 ** -1022;
/** Terms of the series of ln m: z ≤ 0.0295, so that what is left out is below 1e-18 of the first. */
const SERIES = Array.from({ length: 11 }, (_, n) => 2 / (2 * n + 3)).reverse();

const double = new Float64Array(1);
const words = new Uint32Array(double.buffer);
/** Which of the two words of a double has the exponent: 1 where the machine writes its lower end first. */
const TOP = new Uint8Array(Uint32Array.of(1).buffer)[0] === 1 ? 1 : 0;

/** Sum of the powers z/3 + z²/5 + … twice, z = s². */
function tail(z: number): number {
  let sum = 0;
  for (let n = 0; n < SERIES.length; n++) sum = (sum + SERIES[n]!) * z;
  return sum;
}

/** What ln x is beside its double, written by `logarithm`. */
let rest = 0;

/**
 * ln x for x > 0 finite, as a sum of what is returned and `rest`. x = 2^k·(1 + f), ln(1 + f) = 2·artanh(s), s = f/(2 + f), of which the
 * series (Abramowitz and Stegun 4.1.27, from memory) is added to f, the largest part of it, which is exact.
 */
function logarithm(x: number): number {
  let k = 0;
  double[0] = x < SUBNORMAL ? x * 2 ** 54 : x;
  if (x < SUBNORMAL) k = -54;
  const top = words[TOP]!;
  k += (top >>> 20) - 1023;
  words[TOP] = (top & 0xfffff) | 0x3ff00000;
  let m = double[0]!;
  if (m > Math.SQRT2) {
    m /= 2;
    k += 1;
  }
  const f = m - 1;
  const s = f / (2 + f);
  const less = s * (f - tail(s * s)) - k * LN2_LOW;
  const high = k * LN2_HIGH;
  // Two sums with their rounding errors (Dekker, Numer. Math. 18, 1971): |high| ≥ |f| unless it is 0.
  const sum = high + f;
  const lost = f - (sum - high);
  const total = sum - less;
  rest = sum - total - less + lost;
  return total;
}

/** The natural logarithm. */
export function log(x: number): number {
  if (!(x > 0 && x < Number.POSITIVE_INFINITY)) return edge(x);
  return logarithm(x) + rest;
}

/** The decadic logarithm; whole for a power of ten. */
export function log10(x: number): number {
  if (!(x > 0 && x < Number.POSITIVE_INFINITY)) return edge(x);
  const high = logarithm(x);
  const found = high * LOG10_E_HIGH + (high * LOG10_E_LOW + rest * LOG10_E_HIGH);
  const whole = Math.round(found);
  return Math.abs(found - whole) < 1e-12 && Number(`1e${whole}`) === x ? whole : found;
}

function edge(x: number): number {
  if (x === 0) return Number.NEGATIVE_INFINITY;
  return x > 0 ? x : Number.NaN;
}

/** ln(1 + x). */
export function log1p(x: number): number {
  if (!(x > -1 && x < Number.POSITIVE_INFINITY))
    return x === -1 ? Number.NEGATIVE_INFINITY : x > 0 ? x : Number.NaN;
  if (x > -0.29 && x < 0.41) {
    const s = x / (2 + x);
    return x - s * (x - tail(s * s));
  }
  const sum = 1 + x;
  // What rounding took from 1 + x (Kahan).
  const lost = x >= 1 ? 1 - (sum - x) : x - (sum - 1);
  return logarithm(sum) + (rest + lost / sum);
}

/** Terms of the series of arctan t: |t| ≤ tan(π/16), so that what is left out is below 1e-18 of t. */
const ARCTANGENT = Array.from({ length: 12 }, (_, n) => (n % 2 === 0 ? -1 : 1) / (2 * n + 3)).reverse();

/** The arc tangent in radians: halved twice by arctan x = 2·arctan(x/(1 + √(1 + x²))), then its series. Error below 4 units in the last place. */
export function atan(x: number): number {
  const size = Math.abs(x);
  if (!(size > 1e-9)) return x;
  const isSteep = size > 1;
  const t = half(half(isSteep ? 1 / size : size));
  const z = t * t;
  let sum = 0;
  for (let n = 0; n < ARCTANGENT.length; n++) sum = (sum + ARCTANGENT[n]!) * z;
  const angle = 4 * (t + t * sum);
  return Math.sign(x) * (isSteep ? Math.PI / 2 - angle : angle);
}

function half(x: number): number {
  return x / (1 + Math.sqrt(1 + x * x));
}

/** The hyperbolic tangent. Error below 3 units in the last place. */
export function tanh(x: number): number {
  const size = Math.abs(x);
  if (!(size > 1e-9)) return x;
  if (size > 22) return Math.sign(x);
  const grown = expm1(2 * size);
  return Math.sign(x) * (size < 1 ? grown / (grown + 2) : 1 - 2 / (grown + 2));
}

/** Exponents up to which a whole power is multiplied out. */
const MOST_FACTORS = 32;
/** 2^27 + 1: splits a double into two halves of 26 bits (Dekker). */
const SPLITTER = 134217729;

/**
 * x^y: multiplied out for a small whole y, the root for a half, else e^(y·ln x) with the digits of ln x beside a double. Error of a few units
 * in the last place, more where the exponent y·ln x is beyond 100. As the engine's own at the edges.
 */
export function power(x: number, y: number): number {
  if (Number.isInteger(y) && Math.abs(y) <= MOST_FACTORS) return wholePower(x, y);
  if (y === 0.5 && x >= 0 && x < Number.POSITIVE_INFINITY) return Math.sqrt(x);
  const isOdd = Number.isInteger(y) && Math.abs(y % 2) === 1;
  const size = Math.abs(x);
  if (!(size > 0 && size < Number.POSITIVE_INFINITY) || !Number.isFinite(y)) return x ** y;
  if (x < 0 && !Number.isInteger(y)) return Number.NaN;
  const high = logarithm(size);
  const product = high * y;
  const low = lostIn(high, y, product) + rest * y;
  const grown = exp(product);
  const found = Number.isFinite(grown) && grown > 0 ? grown + grown * low : grown;
  return x < 0 && isOdd ? -found : found;
}

function wholePower(x: number, y: number): number {
  let left = Math.abs(y);
  let factor = x;
  let product = 1;
  for (; left > 0; left >>= 1) {
    if (left & 1) product *= factor;
    factor *= factor;
  }
  return y < 0 ? 1 / product : product;
}

/** What rounding took from the product of two numbers of usual size (Dekker). */
function lostIn(a: number, b: number, product: number): number {
  const ah = SPLITTER * a - (SPLITTER * a - a);
  const bh = SPLITTER * b - (SPLITTER * b - b);
  const lost = (a - ah) * (b - bh) - (product - ah * bh - (a - ah) * bh - ah * (b - bh));
  return Number.isFinite(lost) ? lost : 0;
}
