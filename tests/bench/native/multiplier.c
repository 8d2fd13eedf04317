/*
 * One Newton step of the multiplier of tests/bench/circuits.ts, all 22 unknowns, eliminated by hand: each log stage is a system of
 * two, the sums follow one another, and every branch current falls out at the end.
 */
#include "harness.h"
#include "transistor.h"

enum { X, SX, LX, Y, SY, LY, R, SR, LR, P, M, E, SO, OUT, VX, AX, VY, AY, VR, AR, AE, AO };

static const double VT = 1.380649e-23 / 1.602176634e-19 * 298.15;
static const double IS = 0.4e-15, BASE_F = 0.4e-15 / 240, BASE_R = 0.4e-15 / 4, EARLY = 1.0 / 80;
static const double GIN = 1 / 100e3, GSUM = 1 / 20e3, A = 1 / 2e6, OFFSET = 20e-6, BIAS = 20e-12;

/* A source of `volts` at net n through GIN into s, with a transistor from s to the output l, which an amplifier holds. */
static inline void stage(const double *x, double *d, int n, int s, int l, int source, double volts, struct law *q) {
  *q = transistor(-x[l], -x[s], IS, VT, BASE_F, BASE_R, EARLY);
  const double law = x[n] - volts, amp = OFFSET - x[s] - A * x[l];
  const double sum = GIN * (x[s] - x[n]) + q->ic + BIAS, gs = GIN - q->icR;
  d[n] = -law;
  d[l] = (sum - GIN * d[n] + gs * amp) / (q->icF + gs * A);
  d[s] = amp - A * d[l];
  d[source] = GIN * (x[n] - x[s]) - x[source] + GIN * (d[n] - d[s]);
}

/* The output current of an amplifier whose net l also carries an emitter and GSUM to net p. */
static inline void output(const double *x, double *d, const struct law *q, int s, int l, int p, int amp) {
  const double left = -q->ic - q->ib + x[amp] + GSUM * (x[l] - x[p]);
  const double byL = q->icF + q->ibF, byS = q->icR + q->ibR;
  d[amp] = -left - byL * d[l] - byS * d[s] - GSUM * (d[l] - d[p]);
}

static void step(const double *restrict x, double *restrict d) {
  struct law qx, qy, qr;
  stage(x, d, X, SX, LX, VX, 1, &qx);
  stage(x, d, Y, SY, LY, VY, 1, &qy);
  stage(x, d, R, SR, LR, VR, 1, &qr);
  const double atP = GSUM * (2 * x[P] - x[LX] - x[LY]) + BIAS, atM = GSUM * (2 * x[M] - x[LR] - x[E]) + BIAS;
  const double ampE = x[P] - x[M] + OFFSET - A * x[E];
  d[P] = (d[LX] + d[LY] - atP / GSUM) / 2;
  d[E] = (atM / GSUM - d[LR] + 2 * (d[P] + ampE)) / (1 + 2 * A);
  d[M] = d[P] + ampE - A * d[E];
  const struct law qo = transistor(-x[E], -x[SO], IS, VT, BASE_F, BASE_R, EARLY);
  const double ampO = OFFSET - x[SO] - A * x[OUT], gs = GIN - qo.icR;
  const double atS = qo.ic + GIN * (x[SO] - x[OUT]) + BIAS;
  d[OUT] = (atS - qo.icF * d[E] + gs * ampO) / (GIN + gs * A);
  d[SO] = ampO - A * d[OUT];
  d[AO] = -x[AO] - GIN * (x[OUT] - x[SO]) - GIN * (d[OUT] - d[SO]);
  output(x, d, &qx, SX, LX, P, AX);
  output(x, d, &qy, SY, LY, P, AY);
  output(x, d, &qr, SR, LR, M, AR);
  output(x, d, &qo, SO, E, M, AE);
}
