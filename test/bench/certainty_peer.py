"""How sure the places of a ranking are, as one would script it with numpy, for certainty.bench.ts to compare with: the sieve,
the slopes of all pairs of years in every replicate, their median and the two ranks at which the test would reject, percent
of the replicate's mean. Whole replicates at a time, so that numpy works on large arrays; a station's gaps cut out. Innovations
are drawn by year for all stations, and a station draws its own for years in which it has none.

The shrinkage and the places take no time beside that and are left out: the script does less than the program. Beside it the
shorter script that most would write: scipy's theilslopes, replicate by replicate, on the first few replicates of a few stations.

Usage: certainty_peer.py FILE     FILE: JSON, a list of {years, values, factor}
Prints JSON: seconds of processor time of a station by either way (null without scipy), versions, and the mean standard
deviation of the figures, to be looked at.
"""
import json
import sys
import time

import numpy as np

try:
    import scipy
    from scipy.stats import theilslopes
except ImportError:
    scipy = None

REPLICATES, RUN_IN, Z = 500, 30, 1.6448536269514722
LOOPED_STATIONS, LOOPED_REPLICATES = 5, 50

with open(sys.argv[1]) as file:
    ROWS = json.load(file)


def slope_of(t, x):
    i, j = np.triu_indices(len(t), 1)
    return np.median((x[j] - x[i]) / (t[j] - t[i]))


def lag1(t, e):
    e = e - e.mean()
    together = np.flatnonzero(np.diff(t) == 1)
    n = len(e)
    r = (e[together] * e[together + 1]).sum() * n / (len(together) + 1) / (e * e).sum()
    return min(0.95, max(0.0, (n * r + 1) / (n - 4)))


begun = time.process_time()
series = []
for row in ROWS:
    t, x = np.array(row["years"]), np.array(row["values"])
    b = slope_of(t, x)
    a = np.median(x - b * t)
    e = x - a - b * t
    series.append((t, x, b, a, e - e.mean(), row["factor"]))
r = np.median([lag1(t, e) for t, _, _, _, e, _ in series])
first = min(t[0] for t, *_ in series)
last = max(t[-1] for t, *_ in series)
span = last - first + 1
rng = np.random.default_rng(7)
draws = rng.integers(1, span, size=(REPLICATES, RUN_IN + span))

spreads, looped = [], []
for t, x, b, a, e, factor in series:
    full = np.full(span, np.nan)
    full[t - first] = e
    u = np.full(span, np.nan)
    u[1:] = full[1:] - r * full[:-1]
    m = np.isfinite(u).sum()
    u = (u - np.nanmean(u)) * np.sqrt(m / (m - 2))
    own = u[np.isfinite(u)]
    drawn = u[draws]
    none = np.isnan(drawn)
    drawn[none] = rng.choice(own, none.sum())
    state = np.zeros(REPLICATES)
    replicate = np.empty((REPLICATES, span))
    for year in range(RUN_IN + span):
        state = r * state + drawn[:, year]
        if year >= RUN_IN:
            replicate[:, year - RUN_IN] = state
    y = replicate[:, t - first]
    if len(looped) < LOOPED_STATIONS:
        looped.append((t, y[:LOOPED_REPLICATES]))
    n = len(t)
    i, j = np.triu_indices(n, 1)
    slopes = (y[:, j] - y[:, i]) / (t[j] - t[i])
    pairs = slopes.shape[1]
    critical = 1 + Z * np.sqrt(factor * n * (n - 1) * (2 * n + 5) / 18)
    rank = int((pairs - critical) // 2)
    middle = (pairs - 1) // 2
    slopes.partition([rank, middle, pairs // 2, pairs - 1 - rank], axis=1)
    slope = b + (slopes[:, middle] + slopes[:, pairs // 2]) / 2
    detectable = np.quantile(np.concatenate([-slopes[:, rank], slopes[:, pairs - 1 - rank]]), 0.8)
    figure = 1000 * slope / (a + b * t.mean() + y.mean(axis=1))
    spreads.append((figure.std(), detectable))
seconds = (time.process_time() - begun) / len(ROWS)
loop = None
if scipy is not None:
    begun = time.process_time()
    for t, replicates in looped:
        for y in replicates:
            theilslopes(y, t)
    loop = (time.process_time() - begun) / len(looped) * REPLICATES / LOOPED_REPLICATES
spread = float(np.mean(spreads, axis=0)[0])
versions = {"numpy": np.__version__, "scipy": scipy.__version__ if scipy else None}
print(json.dumps({"arrays": seconds, "loop": loop, "versions": versions, "spread": spread}))
