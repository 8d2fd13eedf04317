#!/usr/bin/env python3
"""Circuits of devices with all their terms, at 50 digits, for tests/outside. Needs mpmath (Debian: python3-mpmath).

    /usr/bin/python3 tests/reference/full-devices.py > tests/reference/full-devices.json

Circuits and figures are invented. Each is written here as its currents at every net, with a net of its own behind every resistance,
and solved by Newton's method with a numerical Jacobian at 50 digits; a rough start only says which of several solutions is meant.
Laws and their sources: device-laws.py beside this file.
"""
import json
from mpmath import mp, mpf, exp, expm1, log, sqrt, tanh, findroot, matrix, norm

mp.dps = 60
K = mpf("1.380649e-23")
Q = mpf("1.602176634e-19")
KNEE = mpf(0.05)


def m(x):
    return mpf(float(x))


def saturation(Is, n, p, T):
    T0 = mpf(298.15)
    r = m(Is)
    if T != T0:
        r *= (T / T0) ** (m(p["x"]) / m(n)) * exp(m(p["Eg"]) / (m(n) * K / Q) * (1 / T0 - 1 / T))
    return r


def junction(v, p, T):
    """A diode without its series resistance; light and breakdown included."""
    VT = K * T / Q
    i = saturation(p["Is"], p["n"], p, T) * expm1(v / (m(p["n"]) * VT)) - m(p["photocurrent"])
    if "V_breakdown" in p:
        eta = m(p["n_breakdown"]) * VT
        i -= m(p["I_breakdown"]) * (exp(-(v + m(p["V_breakdown"])) / eta) - exp(-m(p["V_breakdown"]) / eta))
    return i


def bipolar(vb, vc, ve, p, T):
    """Currents into collector and base behind all resistances."""
    VT = K * T / Q
    be, bc = vb - ve, vb - vc
    Is = saturation(p["Is"], 1, p, T)
    early = 1 - bc / m(p["Va_f"]) - be / m(p["Va_r"])
    q2 = Is / m(p["I_knee_f"]) * expm1(be / VT) + Is / m(p["I_knee_r"]) * expm1(bc / VT)
    charge = 1 / (2 * early) + sqrt(1 / (2 * early) ** 2 + q2)
    rise = (T / mpf(298.15)) ** m(p["beta_power"])
    f = Is / (m(p["beta_f"]) * rise) * expm1(be / VT)
    r = Is / (m(p["beta_r"]) * rise) * expm1(bc / VT)
    le = saturation(p["I_leak_e"], p["n_leak_e"], p, T) * expm1(be / (m(p["n_leak_e"]) * VT))
    lc = saturation(p["I_leak_c"], p["n_leak_c"], p, T) * expm1(bc / (m(p["n_leak_c"]) * VT))
    return Is * (exp(be / VT) - exp(bc / VT)) / charge - r - lc, f + r + le + lc


def softplus(y):
    return y + log(1 + exp(-y)) if y > 0 else log(1 + exp(y))


def limited(s, low, high):
    return s - KNEE * softplus((s - m(high)) / KNEE) + KNEE * softplus((m(low) - s) / KNEE)


NPN = dict(Is=3e-16, beta_f=180, beta_r=3, Va_f=70, Va_r=15, beta_power=1.3, I_leak_e=4e-14, n_leak_e=1.9, I_leak_c=2e-13,
           n_leak_c=1.6, I_knee_f=5e-3, I_knee_r=2e-4, R_base=180, R_emitter=0.7, R_collector=12, Eg=1.16, x=3.1)
AMP = dict(gain=4e5, offset=3e-4, offset_drift=2e-6, bias=2e-9, bias_offset=5e-10, R_out=75, out_low=-9.5, out_high=11)
ZENER = dict(Is=2e-15, n=1.1, Rs=4, V_breakdown=5.6, I_breakdown=1e-3, n_breakdown=2.5, photocurrent=0, Eg=1.12, x=3)
LIT = dict(Is=5e-12, n=1.4, Rs=20, V_breakdown=40, I_breakdown=1e-6, n_breakdown=6, photocurrent=0, Eg=1.12, x=3)


def regulator(V, T):
    """Supply, 470 ohm to k, breakdown diode reversed at k with its inner net, load of 2 kilohm at k."""
    def f(k, j):
        drawn = -junction(-j, ZENER, T)
        return [(m(V) - k) / 470 - (k - j) / m(ZENER["Rs"]) - k / 2000, (k - j) / m(ZENER["Rs"]) - drawn]
    return f


def stage(I, T):
    """Base fed by a current, collector from 10 V over 1 kilohm, emitter grounded; nets b, c and the three inside."""
    def f(b, c, bi, ci, ei):
        ic, ib = bipolar(bi, ci, ei, NPN, T)
        ie = ic + ib
        return [m(I) - (b - bi) / m(NPN["R_base"]), (b - bi) / m(NPN["R_base"]) - ib,
                (10 - c) / 1000 - (c - ci) / m(NPN["R_collector"]), (c - ci) / m(NPN["R_collector"]) - ic,
                ie - ei / m(NPN["R_emitter"])]
    return f


def converter(I, T):
    """Log converter: current into s, transistor from s to o with its base at ground, amplifier with all its terms drives o."""
    A, p = AMP, NPN

    def f(s, o, bi, ci, ei, iout):
        ic, ib = bipolar(bi, ci, ei, p, T)
        offset = m(A["offset"]) + m(A["offset_drift"]) * (T - mpf(298.15))
        asked = m(A["gain"]) * (0 - s + offset)
        behind = o - m(A["R_out"]) * iout
        return [m(I) - (s - ci) / m(p["R_collector"]) - (m(A["bias"]) - m(A["bias_offset"]) / 2), (s - ci) / m(p["R_collector"]) - ic,
                (0 - bi) / m(p["R_base"]) - ib, ic + ib + (o - ei) / m(p["R_emitter"]), (o - ei) / m(p["R_emitter"]) + iout + o / 5000,
                (limited(asked, A["out_low"], A["out_high"]) - behind) / m(A["gain"])]
    return f


def light(P, T):
    """Photodiode, its cathode held at ground by an amplifier with 100 kilohm from s to o; light drives current into s."""
    A = AMP
    lit = dict(LIT, photocurrent=P)

    def f(s, o, j, iout):
        # The anode is biased at -5 V; j is the junction's anode side behind Rs.
        i = junction(j - s, lit, T)
        offset = m(A["offset"]) + m(A["offset_drift"]) * (T - mpf(298.15))
        asked = m(A["gain"]) * (0 - s + offset)
        behind = o - m(A["R_out"]) * iout
        return [(-5 - j) / m(lit["Rs"]) - i, i - (s - o) / 100000 - (m(A["bias"]) - m(A["bias_offset"]) / 2), (s - o) / 100000 - iout,
                (limited(asked, A["out_low"], A["out_high"]) - behind) / m(A["gain"])]
    return f


def loop(V, T):
    """A law of amperes with tanh from a to ground, fed over 1 kilohm from V + 0.5 times the voltage of a law of volts of a."""
    def f(a, y):
        return [(m(V) + y / 2 - a) / 1000 - mpf(2) / 1000 * tanh(a / mpf("0.3")) - a * a * a / 10000, y - a * exp(-a * a)]
    return f


CASES = [
    ("regulator", regulator, ["k", None], [298.15, 348.15], [
        (-2, [-0.75, -0.745]), (1, [0.81, 0.81]), (6, [4.86, 4.86]), (7, [5.49, 5.49]), (12, [5.7, 5.65]), (40, [5.95, 5.7])]),
    ("stage", stage, ["b", "c", None, None, None], [298.15, 263.15], [
        (1e-10, [0.3, 10, 0.3, 10, 0]), (1e-8, [0.5, 10, 0.5, 10, 0]), (1e-6, [0.68, 9.8, 0.68, 9.8, 0]),
        (2e-5, [0.78, 6.9, 0.77, 6.8, 0.002]), (1e-4, [0.85, 0.25, 0.83, 0.1, 0.007]), (1e-3, [1, 0.2, 0.85, 0.06, 0.007])]),
    ("converter", converter, ["s", "o", None, None, None, None], [298.15, 333.15], [
        (1e-8, [None, -0.45, 0, 3e-4, -0.45, 9e-5]), (1e-6, [None, -0.57, 0, 3e-4, -0.57, 1e-4]),
        (1e-3, [None, -0.77, -1e-3, -0.01, -0.77, 1e-3])]),
    ("light", light, ["s", "o", None, None], [298.15, 313.15], [
        (0, [None, 5e-4, -5, 0]), (1e-7, [None, 0.01, -5, -1e-7]), (3e-5, [None, 3, -5, -3e-5]), (2e-4, [-5.5, 11, -5, -1.6e-4])]),
    ("loop", loop, ["a", "y"], [298.15], [(0, [0, 0]), (0.1, [0.015, 0.015]), (1, [0.17, 0.16]), (3, [1.05, 0.35]), (-4, [-1.8, -0.07])]),
]


def newton(f, start):
    """Newton's method with differences, a step at most 0.03 V long while it is far, to 50 digits."""
    x = matrix([mpf(v) for v in start])
    n = len(start)
    for _ in range(400):
        F = matrix(f(*x))
        J = matrix(n, n)
        h = mpf("1e-30")
        for j in range(n):
            y = x.copy()
            y[j] += h
            G = matrix(f(*y))
            for i in range(n):
                J[i, j] = (G[i] - F[i]) / h
        d = mp.lu_solve(J, -F)
        longest = max(abs(v) for v in d)
        if longest > mpf("0.03"):
            d *= mpf("0.03") / longest
        x += d
        if longest < mpf("1e-40"):
            return x
    raise ArithmeticError("did not settle")


print("[")
rows = []
for name, make, nets, kelvins, points in CASES:
    for T in kelvins:
        for at, start in points:
            # None: the input of an amplifier that is not at a limit, (offset - s) gain = o.
            input_at = m(AMP["offset"]) + m(AMP["offset_drift"]) * (mpf(T) - mpf(298.15)) - mpf(start[1]) / m(AMP["gain"])
            x = newton(make(at, mpf(T)), [input_at if v is None else v for v in start])
            values = {net: mp.nstr(x[k], 25) for k, net in enumerate(nets) if net is not None}
            rows.append(" " + json.dumps({"circuit": name, "T": T, "at": at, "values": values}))
print(",\n".join(rows))
print("]")
