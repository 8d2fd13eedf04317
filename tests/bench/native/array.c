/* One Newton step of the transistor array of tests/bench/circuits.ts: each cell is eliminated onto the two lines it hangs on. */
#include "harness.h"
#include "transistor.h"

enum { CELLS = 16, VCC = 0, LINE = 1, SOURCE = 2 + 3 * CELLS };

static const double VT = 1.380649e-23 / 1.602176634e-19 * 298.15;
static const double IS = 2e-15, BASE_F = 2e-15 / 150, BASE_R = 2e-15 / 3, EARLY = 1.0 / 60;
static const double GC = 1 / 1e3, GB = 1 / 100.0, GE = 1 / 330.0, GL = 1 / 100.0, SUPPLY = 5, DRIVE = 1.5 / 100;

static void step(const double *restrict x, double *restrict d) {
  double bySelf = GL, left = GL * x[LINE] - DRIVE, atVcc = -x[SOURCE];
  double rows[CELLS][8];
  d[VCC] = SUPPLY - x[VCC];
  for (int k = 0; k < CELLS; k++) {
    const double c = x[2 + 3 * k], b = x[3 + 3 * k], e = x[4 + 3 * k];
    const struct law q = transistor(b - e, b - c, IS, VT, BASE_F, BASE_R, EARLY);
    /* Unknowns c, b, e: the collector's row, the emitter's, then the base's, which takes the step of the line from outside. */
    const double fc = GC * (c - x[VCC]) + q.ic - GC * d[VCC], fe = GE * e - q.ic - q.ib, fb = GB * (b - x[LINE]) + q.ib;
    const double cc = GC - q.icR, cb = q.icF + q.icR, ce = -q.icF, pc = 1 / cc;
    const double lb = -q.ibR * pc, le = (q.icR + q.ibR) * pc;
    const double bb = GB + q.ibF + q.ibR - lb * cb, be = -q.ibF - lb * ce, fb1 = fb - lb * fc;
    const double eb = -(q.icF + q.icR + q.ibF + q.ibR) - le * cb, ee = GE + q.icF + q.ibF - le * ce, fe1 = fe - le * fc;
    const double pe = 1 / ee, lbe = be * pe, pb = 1 / (bb - lbe * eb), fb2 = fb1 - lbe * fe1;
    /* Base: db = (GB dLine - fb2) pb. */
    bySelf += GB - GB * GB * pb;
    left += GB * (x[LINE] - b) + GB * pb * fb2;
    const double row[8] = {fb2, pb, fe1, eb, pe, fc, cb * pc, ce * pc};
    memcpy(rows[k], row, sizeof row);
    rows[k][5] *= pc;
  }
  d[LINE] = -left / bySelf;
  for (int k = 0; k < CELLS; k++) {
    const double *row = rows[k];
    const double db = (GB * d[LINE] - row[0]) * row[1], de = -(row[2] + row[3] * db) * row[4];
    const double dc = -row[5] - row[6] * db - row[7] * de;
    d[2 + 3 * k] = dc;
    d[3 + 3 * k] = db;
    d[4 + 3 * k] = de;
    atVcc += GC * (x[VCC] - x[2 + 3 * k] + d[VCC] - dc);
  }
  d[SOURCE] = atVcc;
}
