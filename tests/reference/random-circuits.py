#!/usr/bin/python3
"""Net voltages of the random circuits at 50 digits, for tests/random. Needs mpmath and numpy (Debian: python3-mpmath, python3-numpy).

    npx tsx tests/random/print.ts | /usr/bin/python3 tests/reference/random-circuits.py > tests/reference/random-circuits.txt

Reads one circuit a line, as JSON, and starts from the answer that comes with it; what it prints does not depend on that but for which
of several solutions it is nearest to. Every figure is the binary64 number that the program reads, taken exactly. Equations, written
here anew: Kirchhoff's current law at every net; Shockley's diode with a series resistance as a net of its own; the transport form of
Ebers and Moll with Early's factor; Is(T) as in Sze and Ng; the amplifier out = A (plus + offset - minus), or plus + offset = minus.
Newton's method with residuals of 50 digits and a Jacobian of binary64, until its step is below 1e-30.
"""
import json
import sys

import numpy as np
from mpmath import mp, mpf, exp, expm1, log1p

mp.dps = 50
K = mpf("1.380649e-23")
Q = mpf("1.602176634e-19")
T0 = mpf(298.15)


def saturation(m, T):
    Is, n, Eg, x = (mpf(m[k]) for k in ("Is", "n", "Eg", "x"))
    if T == T0:
        return Is
    return Is * (T / T0) ** (x / n) * exp(Eg / (n * K / Q) * (1 / T0 - 1 / T))


def rows_of(circuit):
    """The unknowns' names and a function that gives residuals (mpf) and Jacobian (float) at a list of their values."""
    T = mpf(circuit["kelvin"])
    names = list(circuit["nets"])
    elements = []
    for i, e in enumerate(circuit["elements"]):
        e = dict(e, i=i)
        if e["kind"] == "voltage":
            names.append(f"V{i}.i")
        elif e["kind"] == "opamp":
            names.append(f"A{i}.out.i")
        elif e["kind"] == "diode" and circuit["models"][e["model"]]["Rs"] != 0:
            names.append(f"D{i}.inner")
        elements.append(e)
    at = {name: j for j, name in enumerate(names)}
    law = {name: (m, None if m["kind"] == "opamp" else saturation(m, T)) for name, m in circuit["models"].items()}

    def evaluate(x):
        n = len(names)
        F = [mpf(0)] * n
        J = np.zeros((n, n))
        v = lambda net: mpf(0) if net == "ground" else x[at[net]]

        def leave(net, amperes, *slopes):
            if net == "ground":
                return
            F[at[net]] += amperes
            for by, g in slopes:
                if by != "ground":
                    J[at[net], at[by]] += float(g)

        def through(a, b, amperes, *slopes):
            leave(a, amperes, *slopes)
            leave(b, -amperes, *[(by, -g) for by, g in slopes])

        for e in elements:
            kind, i = e["kind"], e["i"]
            if kind == "resistor":
                a, b, g = e["left"], e["right"], 1 / mpf(e["ohms"])
                through(a, b, g * (v(a) - v(b)), (a, g), (b, -g))
            elif kind == "current":
                through(e["left"], e["right"], mpf(e["amperes"]))
            elif kind == "voltage":
                a, b, own = e["left"], e["right"], f"V{i}.i"
                through(a, b, v(own), (own, 1))
                F[at[own]] = v(b) - v(a) - mpf(e["volts"])
                for net, slope in ((a, -1), (b, 1)):
                    if net != "ground":
                        J[at[own], at[net]] += slope
            elif kind == "opamp":
                m, own = law[e["model"]][0], f"A{i}.out.i"
                leave(e["out"], v(own), (own, 1))
                leave(e["plus"], mpf(m["bias"]))
                leave(e["minus"], mpf(m["bias"]))
                inverse = 1 / mpf(m["gain"]) if m["gain"] else mpf(0)
                F[at[own]] = v(e["plus"]) + mpf(m["offset"]) - v(e["minus"]) - v(e["out"]) * inverse
                for net, slope in ((e["plus"], 1), (e["minus"], -1), (e["out"], -inverse)):
                    if net != "ground":
                        J[at[own], at[net]] += float(slope)
            elif kind == "diode":
                m, Is = law[e["model"]]
                eta = mpf(m["n"]) * K * T / Q
                a, c = e["anode"], e["cathode"]
                if m["Rs"]:
                    inner, g = f"D{i}.inner", 1 / mpf(m["Rs"])
                    through(a, inner, g * (v(a) - v(inner)), (a, g), (inner, -g))
                    a = inner
                y = (v(a) - v(c)) / eta
                g = Is / eta * exp(y)
                through(a, c, Is * expm1(y), (a, g), (c, -g))
            else:
                m, Is = law[e["model"]]
                s = 1 if m["kind"] == "npn" else -1
                eta = mpf(m["n"]) * K * T / Q
                b, c, em = e["b"], e["c"], e["e"]
                vbe, vbc = s * (v(b) - v(em)), s * (v(b) - v(c))
                ef, er = exp(vbe / eta), exp(vbc / eta)
                tilt = 1 / mpf(m["Va_f"]) if m["Va_f"] else mpf(0)
                early = 1 - vbc * tilt
                bf, br = mpf(m["beta_f"]), mpf(m["beta_r"])
                ic = Is * (ef - er) * early - Is / br * (er - 1)
                ib = Is / bf * (ef - 1) + Is / br * (er - 1)
                gcf, gbf = Is / eta * ef * early, Is / eta / bf * ef
                gbr = Is / eta / br * er
                gcr = -Is / eta * er * early - Is * (ef - er) * tilt - gbr
                leave(c, s * ic, (b, gcf + gcr), (em, -gcf), (c, -gcr))
                leave(b, s * ib, (b, gbf + gbr), (em, -gbf), (c, -gbr))
                leave(em, -s * (ic + ib), (b, -gcf - gcr - gbf - gbr), (em, gcf + gbf), (c, gcr + gbr))
        return F, J

    return names, evaluate


def inner_voltage(circuit, e, va, vc):
    """A start for the net between a diode and its series resistance."""
    m = circuit["models"][e["model"]]
    Is, eta = saturation(m, mpf(circuit["kelvin"])), mpf(m["n"]) * K * mpf(circuit["kelvin"]) / Q
    u, a = (mpf(va) - mpf(vc)) / eta, Is * mpf(m["Rs"]) / eta
    y = min(u, log1p(u / a)) if u > 0 else u
    for _ in range(80):
        y -= (y + a * expm1(y) - u) / (1 + a * exp(y))
    return mpf(vc) + y * eta


def solve(circuit):
    names, evaluate = rows_of(circuit)
    start = circuit["start"]
    x = []
    for name in names:
        if name.endswith(".inner"):
            e = circuit["elements"][int(name[1:-6])]
            v = lambda net: 0 if net == "ground" else start[f"{net}.v"]
            x.append(inner_voltage(circuit, e, v(e["anode"]), v(e["cathode"])))
        else:
            x.append(mpf(start[name] if "." in name else start[f"{name}.v"]))
    for _ in range(60):
        F, J = evaluate(x)
        rows = np.abs(J).max(axis=1)
        columns = np.abs(J / rows[:, None]).max(axis=0)
        inverse = np.linalg.inv(J / rows[:, None] / columns)
        largest = max(abs(f / mpf(r)) for f, r in zip(F, rows))
        if largest == 0:
            return names, x
        right = np.array([float(f / mpf(r) / largest) for f, r in zip(F, rows)])
        d = inverse @ right / columns
        step = [mpf(float(one)) * largest for one in d]
        x = [one - by for one, by in zip(x, step)]
        if all(abs(by) < mpf("1e-30") for name, by in zip(names, step) if "." not in name):
            return names, x
    raise SystemExit(f"circuit {circuit['seed']} does not settle: {largest}")


print("# Net voltages in units of 1e-19 V, one circuit a line; printed by random-circuits.py, which names their equations.")
for line in sys.stdin:
    circuit = json.loads(line)
    names, x = solve(circuit)
    print(" ".join(str(int(mp.nint(v * mpf(10) ** 19))) for name, v in zip(names, x) if "." not in name), flush=True)
