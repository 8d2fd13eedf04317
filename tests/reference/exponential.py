"""Prints e**y and e**y - 1 at doubles y, to 40 digits, and on request the table of lib/units/exponential.ts.

Run with Debian's python3-mpmath:
    python3 tests/reference/exponential.py > tests/reference/exponential.json
    python3 tests/reference/exponential.py table
"""

import json
import random
import sys

from mpmath import exp, expm1, ln, mp, mpf, nstr

mp.prec = 400


def table():
    for j in range(32):
        whole = mpf(2) ** (mpf(j) / 32)
        high = float(whole)
        print(f"  {high!r}, {float(whole - mpf(high))!r},")
    step = ln(2) / 32
    # The high part keeps 33 bits, so that its product with an integer below 2**20 is exact.
    high = mpf(int(step * 2**38)) / 2**38
    print(repr(float(high)), repr(float(step - high)), repr(float(1 / step)))


def points():
    random.seed(20261201)
    values = [0.0, 1e-300, -1e-300, 1e-20, -1e-20, 1e-9, -1e-9, 0.010830424696249145, -0.010830424696249145]
    values += [1.0, -1.0, 0.5, -0.5, 40.0, -40.0, 708.5, 709.5, -700.0, -708.0, 0.6931471805599453, -0.6931471805599453]
    values += [random.uniform(-1, 1) for _ in range(120)]
    values += [random.uniform(-60, 60) for _ in range(120)]
    values += [random.uniform(-708, 709) for _ in range(60)]
    values += [random.choice([-1, 1]) * 10 ** random.uniform(-18, -1) for _ in range(80)]
    return values


if sys.argv[1:] == ["table"]:
    table()
else:
    rows = [{"y": y, "exp": nstr(exp(mpf(y)), 40), "expm1": nstr(expm1(mpf(y)), 40)} for y in points()]
    print("[" + ",\n".join(json.dumps(row) for row in rows) + "]")
