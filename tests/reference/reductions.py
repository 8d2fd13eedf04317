#!/usr/bin/env python3
"""Straight lines, crossings and runs of made-up curves by numpy 2.4.6 and scipy 1.17.1, for tests/analyses.

    python3 tests/reference/reductions.py > tests/reference/reductions.json

Lines by numpy.linalg.lstsq (singular value decomposition), crossings by scipy.optimize.brentq on numpy.interp, runs by
going through the list of truths.
"""

import json

import numpy as np
from scipy.optimize import brentq


def line(x, y):
    (slope, height), *_ = np.linalg.lstsq(np.column_stack([x, np.ones_like(x)]), y, rcond=None)
    return float(slope), float(height)


def crossing(x, y, level):
    for a, b in zip(range(len(x) - 1), range(1, len(x))):
        if (y[a] - level) * (y[b] - level) <= 0:
            return float(brentq(lambda s: np.interp(s, x, y) - level, x[a], x[b], xtol=1e-15, rtol=1e-15))
    return None


def run(x, truths):
    best, start = 0.0, None
    for value, truth in zip(x, truths):
        if not truth:
            start = None
            continue
        start = value if start is None else start
        best = max(best, value - start)
    return float(best)


def record(name, scale, knob, y, level):
    knob, y = np.array(knob), np.array(y)
    decades = np.log10(np.abs(knob))
    own = decades if scale == "logarithmic" else knob
    slope, height = line(own, y)
    found = crossing(own, y, level)
    return {
        "name": name,
        "scale": scale,
        "knob": knob.tolist(),
        "trace": y.tolist(),
        "level": level,
        "highest": float(np.max(y)),
        "lowest": float(np.min(y)),
        "mean": float(np.mean(y)),
        "span": float(np.ptp(y)),
        "per_decade": line(decades, y)[0],
        "per_unit": line(knob, y)[0],
        "intercept": height,
        "deviation": (y - (slope * own + height)).tolist(),
        "reach": None if found is None else float(10**found if scale == "logarithmic" else found),
        "decades_above": run(decades, y > level),
    }


random = np.random.default_rng(20261201)
four = np.logspace(-9, -5, 41)
volts = np.linspace(0.5, 8.0, 16)
print(
    json.dumps(
        {
            "source": "reductions.py: numpy 2.4.6 lstsq, scipy 1.17.1 brentq",
            "cases": [
                record("log law", "logarithmic", four, 0.0592 * np.log10(four / 1e-6) + random.normal(0, 2e-4, 41), -0.1),
                record("square", "linear", volts, volts**2 / 10, 2.0),
                record("wave", "logarithmic", four, np.sin(6 * np.log10(four)), 0.25),
                record("far from zero", "linear", 300 + np.arange(9.0), 1e3 + 1e-6 * np.arange(9.0) ** 2, 1e3 + 2e-5),
                record("never", "linear", volts, np.full(16, 1.0) + volts * 0, 2.0),
            ],
        },
        indent=1,
    )
)
