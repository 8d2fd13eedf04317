"""What an engineer would script otherwise: the sweeps of tests/bench/circuits.ts by SciPy's root, each point from its neighbour.

    python3 tests/bench/root.py

Needs Debian's python3-scipy. Prints one JSON object: for each circuit the points, those that root calls solved to 1e-9 of what
flows, and the points a second. The equations are those of the circuits, in the same unknowns, by NumPy.
"""

import json
import time
import warnings

import numpy as np
from scipy.optimize import root

VT = 1.380649e-23 / 1.602176634e-19 * 298.15
warnings.filterwarnings("ignore")


def transistor(vbe, vbc, saturation, beta_f, beta_r, early):
    ef, er = np.expm1(np.minimum(vbe / VT, 300)), np.expm1(np.minimum(vbc / VT, 300))
    ic = saturation * (ef - er) * (1 - vbc / early) - saturation / beta_r * er
    return ic, saturation / beta_f * ef + saturation / beta_r * er


def multiplier(x, volts):
    gin, gsum, gain, offset, bias = 1 / 100e3, 1 / 20e3, 2e6, 20e-6, 20e-12
    inputs, sums, logs = x[[0, 3, 6]], x[[1, 4, 7]], x[[2, 5, 8]]
    p, m, e, so, out = x[9:14]
    sources, amps, ae, ao = x[[14, 16, 18]], x[[15, 17, 19]], x[20], x[21]
    ic, ib = transistor(-np.append(logs, e), -np.append(sums, so), 0.4e-15, 240, 4, 80)
    into = gsum * (logs - np.array([p, p, m]))
    return np.concatenate([
        gin * (inputs - sums) - sources,
        gin * (sums - inputs) + ic[:3] + bias,
        into + amps - ic[:3] - ib[:3],
        [gsum * (2 * p - logs[0] - logs[1]) + bias, gsum * (2 * m - logs[2] - e) + bias],
        [gsum * (e - m) + ae - ic[3] - ib[3], gin * (so - out) + ic[3] + bias, gin * (out - so) + ao],
        inputs - np.array([volts, 1, 1]),
        offset - sums - logs / gain,
        [p - m + offset - e / gain, offset - so - out / gain],
    ])


def array(x, volts):
    vcc, line, source = x[0], x[1], x[50]
    c, b, e = x[2:50].reshape(16, 3).T
    ic, ib = transistor(b - e, b - c, 2e-15, 150, 3, 60)
    rows = np.stack([(c - vcc) / 1e3 + ic, (b - line) / 100 + ib, e / 330 - ic - ib], axis=1).ravel()
    ends = [np.sum(vcc - c) / 1e3 - source, line / 100 - volts / 100 + np.sum(line - b) / 100]
    return np.concatenate([ends, rows, [vcc - 5]])


def ladder(x, volts):
    nets, source = x[:-1], x[-1]
    along = np.diff(nets) / -100
    diodes = 1e-12 * np.expm1(np.minimum(nets[1:] / VT, 300))
    inner = diodes - along + np.append(along[1:], 0)
    return np.concatenate([[along[0] - source], inner, [nets[0] - volts]])


def sweep(name, equations, start, values):
    x, solved = start, 0
    begun = time.perf_counter()
    for value in values:
        found = root(equations, x, args=(value,), method="hybr", tol=1e-12)
        left = np.max(np.abs(equations(found.x, value)))
        if left <= 1e-9 * max(1e-3, np.max(np.abs(found.x[-8:]))):
            solved += 1
            x = found.x
    seconds = time.perf_counter() - begun
    return {"points": len(values), "solved": solved, "pointsPerSecond": len(values) / seconds}


def near(*sizes):
    return np.concatenate([np.full(count, value) for count, value in sizes])


start = np.zeros(22)
start[[0, 3, 6]] = [1e-3, 1, 1]
start[[2, 5, 8, 11]] = -0.6
print(json.dumps({
    "multiplier": sweep("multiplier", multiplier, start, np.logspace(-3, 1, 301)),
    "array": sweep("array", array, np.append([5, 0.1], near((48, 0.1), (1, 0.0))), np.linspace(0.1, 2, 301)),
    "ladder100": sweep("ladder", ladder, near((1, 1.0), (100, 0.3), (1, 0.0)), np.linspace(1, 10, 91)),
}))
