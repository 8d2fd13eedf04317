#!/usr/bin/python3
"""Net voltages of the random circuits at 50 digits, for tests/random. Needs mpmath and numpy (Debian: python3-mpmath, python3-numpy).

    npx tsx tests/random/print.ts plain | /usr/bin/python3 tests/reference/random-circuits.py > tests/reference/random-circuits.txt
    npx tsx tests/random/print.ts full | /usr/bin/python3 tests/reference/random-circuits.py > tests/reference/full-circuits.txt

Reads one circuit a line, as JSON, and starts from the answer that comes with it; what it prints does not depend on that but for which
of several solutions it is nearest to. Every figure is the binary64 number that the program reads, taken exactly. Equations, written
here anew as currents at pins, with a net of its own behind every resistance inside a device: Kirchhoff's current law at every net;
Shockley's diode with its exponential breakdown and its photocurrent; the transport form of Ebers and Moll with Early's factors, leakage
and the base charge of Gummel and Poon; Is(T) as in Sze and Ng; the amplifier A (plus + offset - minus) behind its output resistance, held
between its limits by two softplus functions of 50 mV, or plus + offset = minus; laws by their formulas.
Newton's method with residuals of 50 digits and slopes by differences of 1e-22, until its step is below 1e-30.
"""
import json
import sys

import numpy as np
from mpmath import mp, mpf, exp, expm1, log, log10, log1p, sqrt, tanh, atan

mp.dps = 50
K = mpf("1.380649e-23")
Q = mpf("1.602176634e-19")
T0 = mpf(298.15)
KNEE = mpf(0.05)
H = mpf("1e-22")


def saturation(Is, n, m, T):
    Is, n, Eg, x = mpf(Is), mpf(n), mpf(m["Eg"]), mpf(m["x"])
    return Is if T == T0 else Is * (T / T0) ** (x / n) * exp(Eg / (n * K / Q) * (1 / T0 - 1 / T))


def junction(m, T):
    """Current of a diode without its series resistance as a function of its voltage."""
    VT = K * T / Q
    Is, eta = saturation(m["Is"], m["n"], m, T), mpf(m["n"]) * VT
    light = mpf(m.get("photocurrent", 0))
    if not m.get("V_breakdown"):
        return lambda v: Is * expm1(v / eta) - light
    volts, amperes, back = mpf(m["V_breakdown"]), mpf(m["I_breakdown"]), mpf(m["n_breakdown"]) * VT
    rest = exp(-volts / back)
    return lambda v: Is * expm1(v / eta) - light - amperes * (exp(-(v + volts) / back) - rest)


def bipolar(m, T):
    """Currents into collector and base of a transistor behind its resistances as a function of the voltages at c, b, e."""
    VT = K * T / Q
    s, eta = (1 if m["kind"] == "npn" else -1), mpf(m["n"]) * VT
    Is = saturation(m["Is"], m["n"], m, T)
    one = lambda name: 1 / mpf(m[name]) if m.get(name) else mpf(0)
    rise = (T / T0) ** mpf(m.get("beta_power", 0))
    tilt_f, tilt_r, knee_f, knee_r = one("Va_f"), one("Va_r"), one("I_knee_f"), one("I_knee_r")
    base_f, base_r = Is / (mpf(m["beta_f"]) * rise), Is / (mpf(m["beta_r"]) * rise)
    leak = []
    for side in "ec":
        I, n = m.get("I_leak_" + side), m.get("n_leak_" + side)
        leak.append((saturation(I, n, m, T), mpf(n) * VT) if I else (mpf(0), VT))

    def currents(c, b, e):
        be, bc = s * (b - e), s * (b - c)
        f, r = expm1(be / eta), expm1(bc / eta)
        early = 1 - bc * tilt_f - be * tilt_r
        q2 = Is * (f * knee_f + r * knee_r)
        # 1/q_b where q_b^2 = q_b/early + q2, so that without a knee it is Early's factor itself.
        charge = early if q2 == 0 else 1 / (1 / (2 * early) + sqrt(1 / (2 * early) ** 2 + q2))
        le, lc = leak[0][0] * expm1(be / leak[0][1]), leak[1][0] * expm1(bc / leak[1][1])
        return s * (Is * (f - r) * charge - base_r * r - lc), s * (base_f * f + base_r * r + le + lc)

    return currents


def softplus(y):
    return y + log1p(exp(-y)) if y > 0 else log1p(exp(y))


OWN = {
    "hyperbolic tangent": tanh,
    "arc tangent": atan,
    "cube": lambda u: u ** 3,
    "square on one side": lambda u: u * u if u > 0 else mpf(0),
    "square on both sides": lambda u: u * abs(u),
    "root on both sides": lambda u: u / sqrt(1 + u * u),
    "clipped line": lambda u: max(mpf(-1), min(mpf(1), u)),
    "exponential": lambda u: expm1(min(u, mpf(300))),
}
OTHER = {
    "sum": lambda a, b, VT: a / 2 - 2 * b,
    "product": lambda a, b, VT: a * b,
    "ratio": lambda a, b, VT: a / (1 + abs(b)),
    "logarithm": lambda a, b, VT: log(1 + a * a) - log10(max(b, mpf(1e-6))),
    "root": lambda a, b, VT: sqrt(1 + abs(a + b)),
    "larger": lambda a, b, VT: max(a, b),
    "bell": lambda a, b, VT: b * exp(-a * a),
    "thermal logarithm": lambda a, b, VT: VT * log(1 + abs(a - b)),
}


class Circuit:
    """Unknowns by name, and what each element adds to which rows as a function of the unknowns it reads."""

    def __init__(self, circuit):
        self.models, self.elements = circuit["models"], circuit["elements"]
        self.T = mpf(circuit["kelvin"])
        self.names = list(circuit["nets"])
        self.terms = []
        for i, e in enumerate(self.elements):
            getattr(self, e["kind"])(i, e)
        self.at = {name: j for j, name in enumerate(self.names)}

    def term(self, reads, rows, f):
        """f of the values of `reads` gives what is added to each of `rows`; None and "ground" are rows that do not exist."""
        self.terms.append((reads, rows, f))

    def behind(self, net, name, ohms):
        """The net inside a device behind a resistance; the net itself where there is none."""
        if not ohms:
            return net
        self.names.append(name)
        g = 1 / mpf(ohms)
        self.term([net, name], [net, name], lambda a, b: (g * (a - b), g * (b - a)))
        return name

    def branch(self, name):
        self.names.append(name)
        return name

    def resistance(self, e):
        return mpf(e["ohms"]) * (1 + mpf(e.get("drift", 0)) * (self.T - T0))

    def resistor(self, i, e):
        g = 1 / self.resistance(e)
        self.term([e["left"], e["right"]], [e["left"], e["right"]], lambda a, b: (g * (a - b), g * (b - a)))

    def current(self, i, e):
        I = mpf(e["amperes"])
        self.term([], [e["left"], e["right"]], lambda: (I, -I))

    def voltage(self, i, e):
        own, V = self.branch(f"V{i}.i"), mpf(e["volts"])
        self.term([e["left"], e["right"], own], [e["left"], e["right"], own], lambda a, b, I: (I, -I, b - a - V))

    def gain(self, i, e):
        own, A = self.branch(f"G{i}.out.i"), mpf(e["ratio"])
        self.term([e["plus"], e["minus"], e["out"], own], [e["out"], own], lambda p, m, o, I: (I, o - A * (p - m)))

    def opamp(self, i, e):
        own, m = self.branch(f"A{i}.out.i"), self.models[e["model"]]
        bias, half = mpf(m["bias"]), mpf(m.get("bias_offset", 0)) / 2
        offset = mpf(m["offset"]) + mpf(m.get("offset_drift", 0)) * (self.T - T0)
        gain, ohms, low, high = mpf(m["gain"]), mpf(m.get("R_out", 0)), m.get("out_low"), m.get("out_high")
        self.term([], [e["plus"], e["minus"]], lambda: (bias + half, bias - half))

        def law(p, n, o, I):
            if not gain:
                return I, p - n + offset
            s = gain * (p - n + offset)
            held = s
            if high:
                held -= KNEE * softplus((s - mpf(high)) / KNEE)
            if low:
                held += KNEE * softplus((mpf(low) - s) / KNEE)
            return I, (held - (o - ohms * I)) / gain

        self.term([e["plus"], e["minus"], e["out"], own], [e["out"], own], law)

    def diode(self, i, e):
        m = self.models[e["model"]]
        f = junction(m, self.T)
        a, c = self.behind(e["anode"], f"D{i}.inner", m["Rs"]), e["cathode"]
        self.term([a, c], [a, c], lambda u, v: (f(u - v), -f(u - v)))

    def transistor(self, i, e):
        m = self.models[e["model"]]
        f = bipolar(m, self.T)
        pins = [self.behind(e[p], f"Q{i}.{p}_inner", m.get(f"R_{name}")) for p, name in zip("cbe", ("collector", "base", "emitter"))]

        def law(c, b, em):
            ic, ib = f(c, b, em)
            return ic, ib, -ic - ib

        self.term(pins, pins, law)

    def law(self, i, e):
        plus, minus, size, width, shape = e["plus"], e["minus"], mpf(e["size"]), mpf(e["width"]), e["shape"]
        VT = K * self.T / Q
        if shape in OWN:
            f = OWN[shape]
            self.term([plus, minus], [plus, minus], lambda p, m: (size * f((p - m) / width), -size * f((p - m) / width)))
        elif shape in OTHER:
            f, own = OTHER[shape], self.branch(f"L{i}.i")
            self.term([plus, minus, own, e["a"], e["b"]], [plus, minus, own],
                      lambda p, m, I, a, b: (I, -I, p - m - size * f(a / width, b / width, VT)))
        else:
            # The current of an element, or its power over a voltage.
            of = self.elements[int(e["of"][1:])]
            a, b = (of["left"], of["right"]) if of["kind"] == "resistor" else (of["plus"], of["minus"])
            if of["kind"] == "resistor":
                g = 1 / self.resistance(of)
                through = lambda v: g * v
            else:
                f, own_size, own_width = OWN[of["shape"]], mpf(of["size"]), mpf(of["width"])
                through = lambda v: own_size * f(v / own_width)
            driven = (lambda v: size * through(v)) if shape == "copy" else (lambda v: size * through(v) * v / width)
            self.term([a, b], [plus, minus], lambda u, v: (driven(u - v), -driven(u - v)))

    def evaluate(self, x):
        """Residuals (mpf) and Jacobian (float)."""
        n = len(self.names)
        F, J = [mpf(0)] * n, np.zeros((n, n))
        value = lambda name: mpf(0) if name == "ground" else x[self.at[name]]
        for reads, rows, f in self.terms:
            at = [value(name) for name in reads]
            here = f(*at)
            for row, added in zip(rows, here):
                if row != "ground":
                    F[self.at[row]] += added
            for k, name in enumerate(reads):
                if name == "ground":
                    continue
                moved = f(*at[:k], at[k] + H, *at[k + 1:])
                for row, before, after in zip(rows, here, moved):
                    if row != "ground":
                        J[self.at[row], self.at[name]] += float((after - before) / H)
        return F, J


def inner_voltage(m, T, va, vc):
    """A start for the net between a diode and its series resistance, by halving."""
    f, Rs, v = junction(m, T), mpf(m["Rs"]), mpf(va) - mpf(vc)
    far = v + Rs * mpf(m.get("photocurrent", 0))
    low, high = min(far, mpf(0)), max(far, mpf(0))
    for _ in range(120):
        u = (low + high) / 2
        if u + Rs * f(u) > v:
            high = u
        else:
            low = u
    return mpf(vc) + (low + high) / 2


def solve(given):
    circuit = Circuit(given)
    start = given["start"]
    x = []
    for name in circuit.names:
        if name.endswith(".inner"):
            e = circuit.elements[int(name[1:-6])]
            v = lambda net: 0 if net == "ground" else start[f"{net}.v"]
            x.append(inner_voltage(circuit.models[e["model"]], circuit.T, v(e["anode"]), v(e["cathode"])))
        else:
            x.append(mpf(start[name] if name in start else start[f"{name}.v"]))
    for _ in range(60):
        F, J = circuit.evaluate(x)
        rows = np.abs(J).max(axis=1)
        columns = np.abs(J / rows[:, None]).max(axis=0)
        inverse = np.linalg.inv(J / rows[:, None] / columns)
        largest = max(abs(f / mpf(r)) for f, r in zip(F, rows))
        if largest == 0:
            return circuit.names, x
        right = np.array([float(f / mpf(r) / largest) for f, r in zip(F, rows)])
        step = [mpf(float(one)) * largest for one in inverse @ right / columns]
        x = [one - by for one, by in zip(x, step)]
        if all(abs(by) < mpf("1e-30") for name, by in zip(circuit.names, step) if not name.endswith(".i")):
            return circuit.names, x
    raise SystemExit(f"circuit {given['seed']} does not settle: {largest}")


print("# Net voltages in units of 1e-19 V, one circuit a line; printed by random-circuits.py, which names their equations.")
for line in sys.stdin:
    given = json.loads(line)
    names, x = solve(given)
    print(" ".join(str(int(mp.nint(v * mpf(10) ** 19))) for v in x[:len(given["nets"])]), flush=True)
