import { whitenedWindowZ } from '../statistics/whitened-windows.ts';
import { windowScores, windowVariance } from '../statistics/window-scores.ts';
import { factorOfPart, type RowSerialTerms } from './row-serial-terms.ts';
import type { YearlySeries } from './trend-family.ts';

/** Z and S of every window of a series, from usable year i to usable year j, at j·n + i. */
export interface WindowTests {
  n: number;
  /** NaN where the window has too few years */
  z: Float64Array;
  s: Int32Array;
}

/** Mann–Kendall test of every window of at least `fewest` usable years, with the basis's serial correction.
 *
 *  A window is too short to tell its own serial correlation, so the whole period's lag-1 correlation is kept: `ar1` and
 *  `ar1-regional` take the factor for the window's number of years from it, `pre-whitened` whitens the window by it, about
 *  the window's own slope; `all-lags` and `block-bootstrap` keep the whole period's factor.
 *  @throws RangeError when a value is not a finite number
 *  Sources: at the functions of `lib/statistics`. */
export function windowTests(series: YearlySeries, terms: RowSerialTerms, fewest: number): WindowTests {
  const { s, ties, n } = windowScores(series.values);
  if (terms.correction === 'pre-whitened' && !Number.isNaN(terms.r1)) {
    return { n, s, z: whitenedWindowZ(series.years, series.values, { r1: terms.r1, fewest }) };
  }
  const z = new Float64Array(n * n).fill(Number.NaN);
  const byLength = Float64Array.from({ length: n + 1 }, (_, length) => factorOfPart(length, terms));
  for (let i = 0; i + fewest <= n; i++) {
    for (let j = i + fewest - 1; j < n; j++) {
      const cell = j * n + i;
      const length = j - i + 1;
      const variance = byLength[length] * windowVariance(length, ties[cell]);
      z[cell] = s[cell] === 0 || variance === 0 ? 0 : (s[cell] - Math.sign(s[cell])) / Math.sqrt(variance);
    }
  }
  return { n, s, z };
}
