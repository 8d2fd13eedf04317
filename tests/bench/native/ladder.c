/* One Newton step of the diode and resistor ladder of tests/bench/circuits.ts: three diagonals, from the far end to the source. */
#include "harness.h"

#ifndef SECTIONS
#define SECTIONS 10
#endif

static const double VT = 1.380649e-23 / 1.602176634e-19 * 298.15, IS = 1e-12, G = 1 / 100.0, SUPPLY = 5;

static void step(const double *restrict x, double *restrict d) {
  static double ratio[SECTIONS + 1], rest[SECTIONS + 1];
  double pivot = 0, left = 0, above = 0;
  for (int k = SECTIONS; k >= 1; k--) {
    const double e = expm1(x[k] / VT), right = k < SECTIONS ? x[k] - x[k + 1] : 0;
    const double f = G * (x[k] - x[k - 1]) + G * right + IS * e;
    pivot = G + IS / VT * (e + 1) + above;
    left = f + (k < SECTIONS ? rest[k + 1] * G : 0);
    /* d[k] = ratio d[k-1] - rest. */
    ratio[k] = G / pivot;
    rest[k] = left / pivot;
    above = G - G * ratio[k];
  }
  d[0] = SUPPLY - x[0];
  for (int k = 1; k <= SECTIONS; k++) d[k] = ratio[k] * d[k - 1] - rest[k];
  d[SECTIONS + 1] = G * (x[0] - x[1]) - x[SECTIONS + 1] + G * (d[0] - d[1]);
}
