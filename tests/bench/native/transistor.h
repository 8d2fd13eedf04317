/* Ebers and Moll's transport form with a forward Early voltage, as in lib/devices/bipolar.ts: currents into the pins and slopes. */
struct law { double ic, ib, icF, icR, ibF, ibR; };

static inline struct law transistor(double vbe, double vbc, double Is, double eta, double base_f, double base_r, double early_f) {
  const double ef = expm1(vbe / eta), er = expm1(vbc / eta);
  const double transport = Is * (ef - er), early = 1 - vbc * early_f;
  struct law at;
  at.ibF = base_f * (ef + 1) / eta;
  at.ibR = base_r * (er + 1) / eta;
  at.ib = base_f * ef + base_r * er;
  at.ic = transport * early - base_r * er;
  at.icF = Is * (ef + 1) / eta * early;
  at.icR = -Is * (er + 1) / eta * early - transport * early_f - at.ibR;
  return at;
}
