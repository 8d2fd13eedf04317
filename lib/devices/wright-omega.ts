import { log } from "@/lib/units/elementary";
import { exp } from "@/lib/units/exponential";

/**
 * Wright omega function of a real z: the w > 0 with w + ln w = z. It is the Lambert W of e^z without the overflow of e^z, so z may
 * reach ±1e300. Relative error below 4 ulp; below −40 and above 1e10 the asymptotic start has every digit.
 *
 * Method: an asymptotic start, then two steps of the fourth-order iteration of Fritsch, Shafer and Crowley (Comm. ACM 16,
 * 1973), as in Lawrence, Corless and Jeffrey, Algorithm 917 (ACM TOMS 38, 2012). Special cases: 0 at −∞, ∞ at ∞, NaN at NaN.
 */
export function wrightOmega(z: number): number {
  if (!(Math.abs(z) < Number.POSITIVE_INFINITY)) return z === Number.NEGATIVE_INFINITY ? 0 : z;
  let w = start(z);
  if (z < -40 || z > 1e10) return w;
  for (let step = 0; step < 2; step++) {
    const residual = z - w - log(w);
    const above = 1 + w;
    const twice = 2 * above * (above + (2 / 3) * residual);
    w *= 1 + ((residual / above) * (twice - residual)) / (twice - 2 * residual);
  }
  return w;
}

function start(z: number): number {
  if (z < -1) {
    const e = exp(z);
    return z < -40 ? e : e * (1 - e * (1 - 1.5 * e));
  }
  if (z < 4) {
    // Expansion about z = 1, where w = 1 and w' = 1/2.
    const t = z - 1;
    return 1 + t * (0.5 + t * (1 / 16 - t / 192));
  }
  const first = log(z);
  return z - first + first / z;
}
