#!/usr/bin/env python3
"""Currents and slopes of the device laws to 40 digits, for tests/devices. Needs mpmath (Debian: python3-mpmath).

    /usr/bin/python3 tests/reference/device-laws.py > tests/reference/device-laws.json

Every input is the binary64 number that the test reads, taken exactly. Slopes are numerical derivatives of the published
law at 60 digits, not the derivatives that the program writes out. Sources:
  k and q: SI Brochure, 9th ed. (BIPM 2019), section 2.2, exact.
  wright omega: w + ln w = z; Corless and Jeffrey, "The Wright omega function", LNCS 2385 (2002).
  saturation: Is(T) = Is (T/T0)^(x/n) exp(Eg/(n k/q) (1/T0 - 1/T)); Sze and Ng, Physics of Semiconductor Devices, 3rd ed.,
    section 2.3 (from memory).
  diode: Shockley, Bell Syst. Tech. J. 28 (1949); with series resistance I = Is (exp((V - I Rs)/(n VT)) - 1), solved here by
    bisection of the junction voltage and not by the closed form.
  bipolar: transport form of Ebers and Moll, Proc. IRE 42 (1954); Early, Proc. IRE 40 (1952).
"""
import json
from mpmath import mp, mpf, exp, expm1, log, diff

mp.dps = 60
K = mpf("1.380649e-23")
Q = mpf("1.602176634e-19")


def exact(x):
    return None if x is None else mpf(float(x))


def digits(x):
    return mp.nstr(x, 25)


def omega(z):
    if z > 3:
        w = z
        for _ in range(400):
            w = z - log(w)
        return w
    return exp(bisect(lambda u: exp(u) + u - z, z - exp(z), z))


def saturation(p, T):
    Is, n, Eg, x, T0 = p["Is"], p["n"], p["Eg"], p["x"], p["T0"]
    r = Is
    if x is not None:
        r *= (T / T0) ** (x / n)
    if Eg is not None:
        r *= exp(Eg / (n * K / Q) * (1 / T0 - 1 / T))
    return r


def bisect(f, lo, hi):
    for _ in range(420):
        mid = (lo + hi) / 2
        if f(mid) > 0:
            hi = mid
        else:
            lo = mid
    return (lo + hi) / 2


def junction(V, Is, eta, Rs):
    """The junction voltage u with u + Rs Is (e^(u/eta) - 1) = V."""
    f = lambda u: u + Rs * Is * expm1(u / eta) - V
    hi = V
    if V > 0:
        hi = min(V, eta * log(1 + V / (Rs * Is)))
        return bisect(f, mpf(0), hi)
    return bisect(f, V - mpf("1e-30"), min(mpf(0), V + Rs * Is))


def diode(V, Is, n, Rs, T):
    eta = n * K * T / Q
    if Rs is None:
        return Is * expm1(V / eta), Is / eta * exp(V / eta)
    u = junction(V, Is, eta, Rs)
    slope = Is / eta * exp(u / eta)
    return Is * expm1(u / eta), slope / (1 + Rs * slope)


def bipolar(p, T, vbe, vbc):
    eta = p["n"] * K * T / Q
    Is = saturation(p, T)
    rise = 1 if p["beta_power"] is None else (T / p["T0"]) ** p["beta_power"]
    early = 1
    if p["Va_f"] is not None:
        early -= vbc / p["Va_f"]
    if p["Va_r"] is not None:
        early -= vbe / p["Va_r"]
    ibf = 0 if p["beta_f"] is None else Is / (p["beta_f"] * rise) * expm1(vbe / eta)
    ibr = 0 if p["beta_r"] is None else Is / (p["beta_r"] * rise) * expm1(vbc / eta)
    return Is * (exp(vbe / eta) - exp(vbc / eta)) * early - ibr, ibf + ibr


out = {"omega": [], "saturation": [], "diode": [], "bipolar": []}

for z in [-700, -100, -41, -40, -39.9, -20, -5, -2.0001, -2, -1.9, -1, -0.5, 0, 0.5, 1, 1.7, 2, 3, 3.999, 4, 4.001,
          6, 10, 30, 100, 1e3, 4e4, 1e8, 1e15, 1e300]:
    out["omega"].append({"z": z, "w": digits(omega(exact(z)))})

for Is, n, Eg, x, T0, T in [
    (1e-14, 1, 1.12, 3, 300, 300), (1e-14, 1, 1.12, 3, 300, 300.001), (1e-14, 1, 1.12, 3, 300, 233.15),
    (1e-14, 1, 1.12, 3, 300, 398.15), (2e-9, 1.9, 1.11, 3, 298.15, 313.15), (4e-16, 1, 1.17, 3.2, 298.15, 283.15),
    (1e-14, 1, None, 3, 298.15, 350), (1e-14, 1.3, 0.69, None, 298.15, 250), (1e-14, 1, None, None, 298.15, 400),
    (1e-12, 1, 1.11, 3, 298.15, 77.35),
]:
    p = {"Is": exact(Is), "n": exact(n), "Eg": exact(Eg), "x": exact(x), "T0": exact(T0)}
    out["saturation"].append({"Is": Is, "n": n, "Eg": Eg, "x": x, "T0": T0, "T": T, "value": digits(saturation(p, exact(T)))})

for Is, n, T in [(1e-14, 1, 298.15), (2e-9, 1.9, 300.15), (1e-60, 1, 77.35), (1e-6, 1.05, 398.15)]:
    eta = float(n) * 8.617333262e-5 * T
    for Rs in [None, 1e-6, 0.6, 50, 1e6, 1e12]:
        for V in [-5, -0.5, -0.02, -1e-12, 0, 1e-15, 1e-3, 0.02, 0.3, 0.55, 0.8, 1.2, 20, 1000, 40000 * eta]:
            if Rs is None and V / eta > 600:
                continue
            i, g = diode(exact(V), exact(Is), exact(n), exact(Rs), exact(T))
            out["diode"].append({"Is": Is, "n": n, "Rs": Rs, "T": T, "V": V, "i": digits(i), "g": digits(g)})

MODELS = [
    dict(Is=4e-16, n=1, beta_f=240, beta_r=4, Va_f=80, Va_r=None, beta_power=None, Eg=1.17, x=3.2, T0=298.15),
    dict(Is=2e-15, n=1, beta_f=150, beta_r=2, Va_f=60, Va_r=12, beta_power=1.5, Eg=1.11, x=3, T0=298.15),
    dict(Is=1e-15, n=1, beta_f=None, beta_r=None, Va_f=None, Va_r=None, beta_power=None, Eg=None, x=None, T0=298.15),
    dict(Is=1e-14, n=1.2, beta_f=100, beta_r=None, Va_f=None, Va_r=20, beta_power=None, Eg=None, x=3, T0=300),
]
for model in MODELS:
    p = {name: exact(value) for name, value in model.items()}
    for T in [298.15, 263.15, 358.15]:
        for vbe, vce in [(0.6, 0.6), (0.6, 5), (0.7, 0.05), (0.7, 1e-3), (0.65, -0.2), (-3, 2), (0, 0), (0, 1), (-0.4, -1),
                         (0.45, 40), (0.72, 1e-11), (0.72, -1e-11)]:
            be, ce = exact(vbe), exact(vce)
            bc = be - ce
            t = exact(T)
            ic, ib = bipolar(p, t, be, bc)
            slopes = [diff(lambda v: bipolar(p, t, v, bc)[k], be) for k in (0, 1)] + [
                diff(lambda v: bipolar(p, t, be, v)[k], bc) for k in (0, 1)]
            out["bipolar"].append({"model": model, "T": T, "vbe": vbe, "vce": vce, "ic": digits(ic), "ib": digits(ib),
                                   "icF": digits(slopes[0]), "ibF": digits(slopes[1]), "icR": digits(slopes[2]),
                                   "ibR": digits(slopes[3])})

print("{")
for n, (name, rows) in enumerate(out.items()):
    print(' "%s": [' % name)
    print(",\n".join("  " + json.dumps(row) for row in rows))
    print(" ]" + ("," if n < len(out) - 1 else ""))
print("}")
