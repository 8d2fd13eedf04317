"""Prints elementary functions at doubles, to 40 digits.

Run with Debian's python3-mpmath:
    python3 tests/reference/elementary.py > tests/reference/elementary.json
"""

import json
import random

from mpmath import atan, ln, log, log1p, mp, mpf, nstr, tanh

mp.prec = 400
random.seed(20261201)

wide = [10 ** random.uniform(-300, 300) for _ in range(80)]
near = [random.uniform(0.5, 2) for _ in range(80)] + [1 + random.choice([-1, 1]) * 10 ** random.uniform(-15, -1) for _ in range(60)]
signed = [random.choice([-1, 1]) * 10 ** random.uniform(-12, 2) for _ in range(100)] + [random.uniform(-3, 3) for _ in range(100)]
above = [x for x in signed if x > -1] + [random.uniform(-0.999, 3) for _ in range(60)]
decades = [float(f"1e{k}") for k in range(-20, 23)] + [5e-324, 1.7e308]
bases = [(random.uniform(0.8, 1.25), random.uniform(-8, 8)) for _ in range(80)]
bases += [(10.0, random.uniform(-12, 12)) for _ in range(80)]
bases += [(10 ** random.uniform(-6, 6), random.uniform(-4, 4)) for _ in range(80)]
bases += [(random.uniform(-20, 20), float(random.randint(-9, 9))) for _ in range(40)]


def rows(f, values):
    return [[x, nstr(f(mpf(x)), 40)] for x in values]


print(
    json.dumps(
        {
            "log": rows(ln, wide + near + decades),
            "log10": rows(lambda x: log(x, 10), wide + near + decades),
            "log1p": rows(log1p, above),
            "tanh": rows(tanh, signed),
            "atan": rows(atan, signed + wide),
            "power": [[x, y, nstr(mpf(x) ** mpf(y), 40)] for x, y in bases],
        },
        indent=0,
    )
)
