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
  bipolar: transport form of Ebers and Moll, Proc. IRE 42 (1954); Early, Proc. IRE 40 (1952); leakage of its own ideality and
    base charge q_b = q_1/2 + sqrt((q_1/2)^2 + q_2) of Gummel and Poon, Bell Syst. Tech. J. 49 (1970) (from memory).
  breakdown: a second exponential from the reverse voltage V_b on, less its value at 0 V (common practice); with series
    resistance solved by bisection of the junction voltage.
  limits: s - k ln(1 + e^((s-high)/k)) + k ln(1 + e^((low-s)/k)), a choice of this program.
"""
import json
from mpmath import mp, mpf, exp, expm1, log, sqrt, diff

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
    transport = Is * (exp(vbe / eta) - exp(vbc / eta)) * early
    q2 = sum(Is / p[knee] * expm1(v / eta) for knee, v in (("I_knee_f", vbe), ("I_knee_r", vbc)) if p[knee] is not None)
    if q2 != 0:
        # q_b by its quadratic, q_b^2 - q_1 q_b - q_2 = 0 with q_1 = 1/early.
        charge = 1 / (2 * early) + sqrt(1 / (2 * early) ** 2 + q2)
        transport = Is * (exp(vbe / eta) - exp(vbc / eta)) / charge
    leaks = [0, 0]
    for k, (leak, ideality, v) in enumerate((("I_leak_e", "n_leak_e", vbe), ("I_leak_c", "n_leak_c", vbc))):
        if p[leak] is not None:
            own = dict(p, Is=p[leak], n=p[ideality])
            leaks[k] = saturation(own, T) * expm1(v / (p[ideality] * K * T / Q))
    return transport - ibr - leaks[1], ibf + ibr + leaks[0] + leaks[1]


def breakdown(V, p, T):
    """Current and slope of a diode with breakdown; u is the junction voltage."""
    eta, etab = p["n"] * K * T / Q, p["n_breakdown"] * K * T / Q
    Ib, Vb = p["I_breakdown"], p["V_breakdown"]
    law = lambda u: p["Is"] * expm1(u / eta) - Ib * (exp(-(u + Vb) / etab) - exp(-Vb / etab))
    slope = lambda u: p["Is"] / eta * exp(u / eta) + Ib / etab * exp(-(u + Vb) / etab)
    if p["Rs"] is None:
        return law(V), slope(V)
    u = bisect(lambda u: u + p["Rs"] * law(u) - V, min(V, mpf(0)), max(V, mpf(0)))
    g = slope(u)
    return law(u), g / (1 + p["Rs"] * g)


def limited(s, low, high):
    k = exact(0.05)
    v = s
    if high is not None:
        v -= k * log(1 + exp((s - high) / k))
    if low is not None:
        v += k * log(1 + exp((low - s) / k))
    return v


out = {"omega": [], "saturation": [], "diode": [], "bipolar": [], "breakdown": [], "limits": []}

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

BARE = dict(Is=1e-15, n=1, beta_f=None, beta_r=None, Va_f=None, Va_r=None, beta_power=None, Eg=None, x=None, T0=298.15,
            I_leak_e=None, n_leak_e=2, I_leak_c=None, n_leak_c=2, I_knee_f=None, I_knee_r=None)
MODELS = [
    dict(BARE, Is=4e-16, beta_f=240, beta_r=4, Va_f=80, Eg=1.17, x=3.2),
    dict(BARE, Is=2e-15, beta_f=150, beta_r=2, Va_f=60, Va_r=12, beta_power=1.5, Eg=1.11, x=3),
    BARE,
    dict(BARE, Is=1e-14, n=1.2, beta_f=100, Va_r=20, x=3, T0=300),
    dict(BARE, beta_f=300, I_leak_e=3e-14),
    dict(BARE, Is=3e-16, beta_f=200, beta_r=3, Va_f=70, I_leak_e=2e-13, n_leak_e=1.8, I_leak_c=5e-14, n_leak_c=1.5, Eg=1.14, x=3.1),
    dict(BARE, beta_f=120, I_knee_f=2e-3),
    dict(BARE, Is=2e-15, beta_f=150, beta_r=2, Va_f=60, Va_r=12, beta_power=1.5, Eg=1.11, x=3, I_leak_e=1e-13, I_knee_f=1e-4,
         I_knee_r=1e-5),
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

for p in [
    dict(Is=1e-14, n=1, Rs=None, V_breakdown=5.1, I_breakdown=1e-3, n_breakdown=1, T=298.15),
    dict(Is=2e-9, n=1.9, Rs=None, V_breakdown=75, I_breakdown=2e-9, n_breakdown=3, T=348.15),
    dict(Is=1e-14, n=1, Rs=12, V_breakdown=5.1, I_breakdown=1e-3, n_breakdown=1.5, T=298.15),
    dict(Is=2e-9, n=1.9, Rs=0.04, V_breakdown=100, I_breakdown=1e-4, n_breakdown=2, T=273.15),
    dict(Is=1e-12, n=1, Rs=1e6, V_breakdown=0.8, I_breakdown=1e-12, n_breakdown=1, T=298.15),
]:
    for V in [-1000, -130, -100.5, -100, -76, -75, -30, -6, -5.2, -5.1, -5, -4.4, -2, -0.9, -0.8, -0.4, -0.02, -1e-9, 0, 1e-3,
              0.4, 0.7, 5, 100]:
        if p["Rs"] is None and (V / (p["n"] * 0.0257) > 600 or (-V - p["V_breakdown"]) / (p["n_breakdown"] * 0.0257) > 600):
            continue
        i, g = breakdown(exact(V), {name: exact(value) for name, value in p.items()}, exact(p["T"]))
        out["breakdown"].append(dict(p, V=V, i=digits(i), g=digits(g)))

for low, high in [(-12, 12), (None, 3.3), (0, None), (-0.02, 0.05), (0, 5)]:
    for s in [-1e6, -40, -12.3, -12.05, -12, -11.9, -1, -0.1, -0.02, 0, 1e-9, 0.03, 0.05, 0.2, 3, 3.3, 3.4, 5, 11.5, 12, 12.2, 200,
              3e7]:
        f = lambda v: limited(v, exact(low), exact(high))
        # ln(1 + e^y) of a large y needs as many more digits as y/ln 10.
        with mp.workdps(60 + min(2000, int(abs(s) / 0.05))):
            slope = mpf(1)
            if high is not None:
                slope -= 1 / (1 + exp((exact(high) - exact(s)) / exact(0.05)))
            if low is not None:
                slope -= 1 / (1 + exp((exact(s) - exact(low)) / exact(0.05)))
            v = f(exact(s))
        if abs(s) < 20:
            difference = diff(f, exact(s))
            assert abs(difference - slope) < mpf("1e-30"), (low, high, s)
        out["limits"].append({"low": low, "high": high, "s": s, "v": digits(v), "slope": digits(slope)})

print("{")
for n, (name, rows) in enumerate(out.items()):
    print(' "%s": [' % name)
    print(",\n".join("  " + json.dumps(row) for row in rows))
    print(" ]" + ("," if n < len(out) - 1 else ""))
print("}")
