"""Start-end charts as one would script them with numpy and scipy, for windows.bench.ts to compare with.

Signs and slopes of all pairs of years are taken once a station; every window then sums a block of the signs, corrects the
variance for ties and serial correlation (factor by number of years, made once), and for a station's own chart takes the
median of a block of the slopes. Processor time on one thread, as the program's.

Usage: windows_peer.py ROWS.json     prints JSON: station and region, milliseconds
"""
import json
import sys
import time

import numpy as np
from scipy.stats import norm

FEWEST, R1, ALPHA = 15, 0.3, 0.1


def factors(most):
    n = np.arange(3, most + 1)
    found = np.ones(most + 1)
    for each in n:
        k = np.arange(1, each)
        found[each] = 1 + 2 * np.sum((each - k) * (each - k - 1) * (each - k - 2) * R1**k) / (
            each * (each - 1) * (each - 2)
        )
    return found


def variance(part, factor):
    n = len(part)
    counts = np.unique(part, return_counts=True)[1]
    ties = np.sum(counts * (counts - 1) * (2 * counts + 5))
    return factor * (n * (n - 1) * (2 * n + 5) - ties) / 18


def scores(x, by_length):
    """S and Z of every window."""
    n = len(x)
    signs = np.triu(np.sign(x[None, :] - x[:, None]))
    s = np.full((n, n), np.nan)
    z = np.full((n, n), np.nan)
    for i in range(n - FEWEST + 1):
        for j in range(i + FEWEST - 1, n):
            s[i, j] = signs[i : j + 1, i : j + 1].sum()
            z[i, j] = (s[i, j] - np.sign(s[i, j])) / np.sqrt(variance(x[i : j + 1], by_length[j - i + 1]))
    return s, z


def station_chart(t, x, by_length):
    n = len(x)
    _, z = scores(x, by_length)
    p = 2 * norm.sf(np.abs(z))
    with np.errstate(invalid="ignore"):
        slopes = (x[None, :] - x[:, None]) / (t[None, :] - t[:, None])
    percent = np.full((n, n), np.nan)
    for i in range(n - FEWEST + 1):
        for j in range(i + FEWEST - 1, n):
            block = slopes[i : j + 1, i : j + 1]
            percent[i, j] = 1000 * np.median(block[np.triu_indices(j - i + 1, 1)]) / x[i : j + 1].mean()
    return z, p, percent


def region_chart(stations, by_length):
    critical = norm.ppf(1 - ALPHA / 2)
    negative = falling = rising = 0
    for x in stations:
        s, z = scores(x, by_length)
        negative = negative + (s < 0)
        falling = falling + (z < -critical)
        rising = rising + (z > critical)
    return negative, falling, rising


def milliseconds(work, rounds):
    best = float("inf")
    for _ in range(rounds):
        begun = time.process_time()
        work()
        best = min(best, time.process_time() - begun)
    return 1000 * best


if __name__ == "__main__":
    with open(sys.argv[1]) as file:
        rows = json.load(file)
    t = np.array(rows["years"], dtype=float)
    stations = [np.array(values) for values in rows["values"]]
    by_length = factors(len(t))
    print(
        json.dumps(
            {
                "station": milliseconds(lambda: station_chart(t, stations[0], by_length), 3),
                "region": milliseconds(lambda: region_chart(stations, by_length), 1),
            }
        )
    )
