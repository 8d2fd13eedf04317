#!/usr/bin/env python3
"""Slopes of expressions of the language to 40 digits, for tests/language. Needs mpmath (Debian: python3-mpmath).

    /usr/bin/python3 tests/reference/derivatives.py > tests/reference/derivatives.json

Every case is an expression of two net voltages a and b (V), of the knob k = 3 and of V_T at 25 C, written in the language and again
for mpmath. Values are worked out at 50 digits, slopes by finite differences at 50 digits (Fornberg's weights; mpmath.diff), and
so by no rule of the calculus that the program uses. k and q: SI Brochure, 9th ed. (BIPM 2019), section 2.2, exact.
"""
import json
from mpmath import mp, mpf, exp, log, log10, sqrt, tanh, atan, diff, pi

mp.dps = 50
K = 3
VT = mpf("1.380649e-23") * mpf("298.15") / mpf("1.602176634e-19")
A, B = "(a.v / 1 V)", "(b.v / 1 V)"

CASES = [
    ("a.v", lambda a, b: a),
    ("a.v + 2 * b.v - 3 V", lambda a, b: a + 2 * b - 3),
    ("-a.v * -b.v / 1 V", lambda a, b: a * b),
    ("a.v * k + b.v * k", lambda a, b: K * a + K * b),
    ("a.v * b.v / 1 V + b.v", lambda a, b: a * b + b),
    ("a.v / b.v * 1 V", lambda a, b: a / b),
    ("1 V * (a.v + 1 V) / (b.v * b.v + 1 V²) * 1 V", lambda a, b: (a + 1) / (b * b + 1)),
    ("a.v^2 / 1 V", lambda a, b: a**2),
    ("a.v^3 / (1 V)^2 - b.v", lambda a, b: a**3 - b),
    (f"1 V * {A}^-1.5", lambda a, b: a ** mpf("-1.5")),
    (f"1 V * {A}^{B}", lambda a, b: a**b),
    (f"1 V * 2^{A}", lambda a, b: mpf(2) ** a),
    (f"1 V * {A}^k", lambda a, b: a**K),
    (f"1 V * exp({A})", lambda a, b: exp(a)),
    (f"1 V * exp(-{A} * {B})", lambda a, b: exp(-a * b)),
    ("1 V * exp((a.v - b.v) / V_T)", lambda a, b: exp((a - b) / VT)),
    (f"1 V * ln({A})", lambda a, b: log(a)),
    (f"V_T * ln({A} / {B})", lambda a, b: VT * log(a / b)),
    (f"1 V * log10({A} + {B}^2)", lambda a, b: log10(a + b * b)),
    ("sqrt(a.v * b.v)", lambda a, b: sqrt(a * b)),
    ("sqrt(a.v^2 + b.v^2)", lambda a, b: sqrt(a * a + b * b)),
    ("abs(a.v - b.v)", lambda a, b: abs(a - b)),
    ("abs(b.v - a.v) * abs(a.v) / 1 V", lambda a, b: abs(b - a) * abs(a)),
    ("min(a.v, b.v)", lambda a, b: min(a, b)),
    ("max(a.v^2 / 1 V, b.v, 0.1 V * k)", lambda a, b: max(a * a, b, mpf(float("0.1")) * K)),
    ("min(a.v, 2 * b.v, a.v * b.v / 1 V)", lambda a, b: min(a, 2 * b, a * b)),
    (f"1 V * tanh({A} * {B})", lambda a, b: tanh(a * b)),
    (f"1 V * tanh(20 * {A})", lambda a, b: tanh(20 * a)),
    (f"1 V * atan({A} / {B})", lambda a, b: atan(a / b)),
    ("if(a.v > b.v, a.v * b.v / 1 V, sqrt(a.v * 1 V))", lambda a, b: a * b if a > b else sqrt(a)),
    (f"if({A} <= 1, 1 V * exp({A}), 1 V * (exp(1) * {A}))", lambda a, b: exp(a) if a <= 1 else exp(mpf(1)) * a),
    (f"V_T * ln(1 + exp((a.v - b.v) / V_T))", lambda a, b: VT * log(1 + exp((a - b) / VT))),
    (f"12 V * tanh(k * {A}) / (1 + atan({B}) / pi)", lambda a, b: 12 * tanh(K * a) / (1 + atan(b) / pi)),
    ("1 V", lambda a, b: mpf(1) + 0 * a),
]
POINTS = [(0.25, 0.75), (1.5, 0.5), (2.0, 3.125), (0.015625, 1.25)]


def digits(x):
    return mp.nstr(mpf(x), 40)


def main():
    cases = []
    for text, f in CASES:
        rows = []
        for a, b in POINTS:
            x, y = mpf(a), mpf(b)
            rows.append(
                {
                    "a": a,
                    "b": b,
                    "value": digits(f(x, y)),
                    "by_a": digits(diff(f, (x, y), (1, 0))),
                    "by_b": digits(diff(f, (x, y), (0, 1))),
                    "by_a_a": digits(diff(f, (x, y), (2, 0))),
                    "by_a_b": digits(diff(f, (x, y), (1, 1))),
                }
            )
        cases.append({"expression": text, "points": rows})
    print(json.dumps({"source": __doc__.strip(), "cases": cases}, indent=1, ensure_ascii=False))


main()
