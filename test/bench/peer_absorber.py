"""Task T5 as an expert would script it with NumPy and SciPy.

Reads the case as JSON, prints medians [ms] and the values found, so that both sides can be compared."""
import json
import sys
import time

import numpy as np
from scipy.optimize import fsolve, minimize

G = json.load(sys.stdin)
mu, z1, side = G["massRatio"], G["hostDamping"], G["side"]


def median(work, runs=9, warm=2):
    for _ in range(warm):
        work()
    times = []
    for _ in range(runs):
        start = time.perf_counter()
        work()
        times.append(1e3 * (time.perf_counter() - start))
    return float(np.median(times))


def magnitude(g, f, z):
    x = g * g
    re_a, im_a = f * f - x, 2 * z * f * g
    h = 2 * z1 * g
    re = (1 - x) * re_a - h * im_a - mu * x * f * f
    im = (1 - x) * im_a + h * re_a - mu * x * im_a
    return np.sqrt((re_a**2 + im_a**2) / (re**2 + im**2))


GRID = np.linspace(0.6, 1.4, 401)
STEP = GRID[1] - GRID[0]
OFFSETS = np.linspace(-1, 1, 41)


def worst(f, z):
    """Coarse grid, then a fine one about its highest point, then a parabola through three points."""
    t = magnitude(GRID, f, z)
    g = GRID[np.argmax(t)] + STEP * OFFSETS
    t = magnitude(g, f, z)
    k = min(max(int(np.argmax(t)), 1), len(g) - 2)
    a, b, c = t[k - 1], t[k], t[k + 1]
    return b - (c - a) ** 2 / (8 * (c - 2 * b + a))


def slope(g, f, z, e=1e-6):
    return (magnitude(g + e, f, z) - magnitude(g - e, f, z)) / (2 * e)


def gradient(g, f, z, e=1e-6):
    return np.array(
        [
            (magnitude(g, f + e, z) - magnitude(g, f - e, z)) / (2 * e),
            (magnitude(g, f, z + e) - magnitude(g, f, z - e)) / (2 * e),
        ]
    )


def conditions(v):
    f, z, g1, g2 = v
    d1, d2 = gradient(g1, f, z), gradient(g2, f, z)
    return [
        magnitude(g1, f, z) - magnitude(g2, f, z),
        slope(g1, f, z),
        slope(g2, f, z),
        d1[0] * d2[1] - d1[1] * d2[0],
    ]


def minimax():
    start = [1 / (1 + mu), np.sqrt(3 * mu / (8 * (1 + mu)))]
    found = minimize(lambda p: worst(*p), start, method="Nelder-Mead", options={"xatol": 1e-4, "fatol": 1e-6})
    f, z = found.x
    t = magnitude(GRID, f, z)
    tops = np.flatnonzero((t[1:-1] > t[:-2]) & (t[1:-1] >= t[2:])) + 1
    f, z, g1, g2 = fsolve(conditions, [f, z, GRID[tops[0]], GRID[tops[-1]]], xtol=1e-10)
    return f, z, float(magnitude(g1, f, z))


def minimax_search_only():
    start = [1 / (1 + mu), np.sqrt(3 * mu / (8 * (1 + mu)))]
    found = minimize(lambda p: worst(*p), start, method="Nelder-Mead", options={"xatol": 1e-8, "fatol": 1e-10})
    return found.x[0], found.x[1], float(found.fun)


FS = np.linspace(*G["frequencyRatios"], side)
ZS = np.linspace(*G["dampingRatios"], side)


def peak_map():
    """All tunings at once: each grid is refined about its own highest point."""
    f, z = (a.ravel()[:, None] for a in np.meshgrid(FS, ZS, indexing="ij"))
    t = magnitude(GRID[None, :], f, z)
    centre = GRID[np.argmax(t, axis=1)][:, None]
    g = centre + STEP * OFFSETS[None, :]
    t = magnitude(g, f, z)
    k = np.clip(np.argmax(t, axis=1), 1, len(OFFSETS) - 2)
    rows = np.arange(len(k))
    a, b, c = t[rows, k - 1], t[rows, k], t[rows, k + 1]
    return b - (c - a) ** 2 / (8 * (c - 2 * b + a))


f, z, peak = minimax()
peaks = peak_map()
print(
    json.dumps(
        {
            "minimax": median(minimax),
            "minimaxSearchOnly": median(minimax_search_only),
            "peakMap": median(peak_map),
            "found": {"frequencyRatio": float(f), "dampingRatio": float(z), "peak": peak},
            "map": [float(v) for v in peaks],
        }
    )
)
