"""The ranking's work as one would script it with numpy, pandas and scipy, for ranking.bench.ts to compare with.

Reads every record of a region from the database, takes the smallest 7-day mean of each low-flow year that has at most 18
missing days, then the Mann-Kendall test (scipy's tau-b p), the Theil-Sen slope with its interval, and Benjamini-Hochberg
over all stations. On as many processes as there are cores. No common period, no serial correction, no other rule of a
usable year: it does less than the program.

Usage: ranking_peer.py DATABASE SLUG START_MONTH     prints JSON: seconds, stations, peakMB
"""
import json
import multiprocessing
import resource
import sqlite3
import sys
import time

import numpy as np
import pandas as pd
from scipy import stats

DATABASE, SLUG, START_MONTH = sys.argv[1], sys.argv[2], int(sys.argv[3])
DAYS, MOST_MISSING, LEAST_YEARS = 7, 18, 20


def read(station):
    connection = sqlite3.connect(f"file:{DATABASE}?mode=ro", uri=True)
    row = connection.execute(
        'SELECT p.firstDay, p."values" FROM Record r JOIN Part p ON p.id = r.partId WHERE r.stationId = ?', (station,)
    ).fetchone()
    connection.close()
    return row


def minima(first_day, values):
    flow = np.frombuffer(values, dtype="<f8")
    index = pd.date_range(pd.Timestamp("1970-01-01") + pd.Timedelta(first_day, unit="D"), periods=len(flow), freq="D")
    years = index.year.to_numpy() - (index.month.to_numpy() < START_MONTH)
    starts = np.flatnonzero(np.diff(years, prepend=years[0] - 1))
    lengths = np.diff(np.append(starts, len(flow)))
    means = np.full(len(flow), np.nan)
    means[DAYS - 1 :] = np.lib.stride_tricks.sliding_window_view(flow, DAYS).mean(axis=1)
    for day in range(DAYS - 1):  # a window lies inside one year
        means[np.minimum(starts + day, len(flow) - 1)] = np.nan
    smallest = np.fmin.reduceat(means, starts)
    missing = np.add.reduceat(np.isnan(flow).astype(int), starts) + np.maximum(0, 365 - lengths)
    good = (missing <= MOST_MISSING) & ~np.isnan(smallest)
    return years[starts][good], smallest[good]


def trend(station):
    row = read(station)
    if row is None:
        return None
    t, x = minima(*row)
    if len(t) < LEAST_YEARS:
        return None
    tau, p = stats.kendalltau(t, x)
    slope, _, low, high = stats.theilslopes(x, t, 0.95)
    return station, slope, low, high, tau, p


def adjusted_for_number(p):
    """Benjamini-Hochberg; scipy has it from 1.11 on."""
    order = np.argsort(p)[::-1]
    steps = np.minimum.accumulate(p[order] * len(p) / np.arange(len(p), 0, -1))
    adjusted = np.empty(len(p))
    adjusted[order] = np.minimum(steps, 1)
    return adjusted


if __name__ == "__main__":
    begun = time.perf_counter()
    connection = sqlite3.connect(f"file:{DATABASE}?mode=ro", uri=True)
    stations = [
        row[0]
        for row in connection.execute(
            "SELECT s.id FROM Station s JOIN Region g ON g.id = s.regionId WHERE g.slug = ? ORDER BY s.code", (SLUG,)
        )
    ]
    with multiprocessing.Pool() as pool:
        rows = [row for row in pool.map(trend, stations, chunksize=20) if row is not None]
    adjusted = adjusted_for_number(np.array([row[5] for row in rows]))
    ranked = sorted(zip(rows, adjusted), key=lambda pair: pair[0][1])
    seconds = time.perf_counter() - begun
    kilobytes = resource.getrusage(resource.RUSAGE_SELF).ru_maxrss + resource.getrusage(resource.RUSAGE_CHILDREN).ru_maxrss
    print(json.dumps({"seconds": seconds, "stations": len(ranked), "peakMB": kilobytes / 1024}))
