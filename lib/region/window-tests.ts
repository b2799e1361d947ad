import { mannKendall } from '../statistics/mann-kendall.ts';
import { preWhitened } from '../statistics/pre-whitening.ts';
import { windowScores, windowVariance } from '../statistics/window-scores.ts';
import { windowSlopes } from '../statistics/window-slopes.ts';
import { factorOfPart, type RowSerialTerms } from './row-serial-terms.ts';
import type { YearlySeries } from './trend-family.ts';

/** Z and S of every window of a series, from usable year i to usable year j, at i·n + j. */
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
  const z = new Float64Array(n * n).fill(Number.NaN);
  if (terms.correction === 'pre-whitened' && !Number.isNaN(terms.r1)) {
    return { n, s, z: whitenedZ(series, terms.r1, fewest, z) };
  }
  const byLength = Float64Array.from({ length: n + 1 }, (_, length) => factorOfPart(length, terms));
  for (let i = 0; i + fewest <= n; i++) {
    for (let j = i + fewest - 1; j < n; j++) {
      const cell = i * n + j;
      const length = j - i + 1;
      const variance = byLength[length] * windowVariance(length, ties[cell]);
      z[cell] = s[cell] === 0 || variance === 0 ? 0 : (s[cell] - Math.sign(s[cell])) / Math.sqrt(variance);
    }
  }
  return { n, s, z };
}

function whitenedZ({ years, values }: YearlySeries, r1: number, fewest: number, z: Float64Array): Float64Array {
  const n = years.length;
  const slopes = windowSlopes(years, values, fewest);
  for (let i = 0; i + fewest <= n; i++) {
    for (let j = i + fewest - 1; j < n; j++) {
      const part = { years: years.slice(i, j + 1), values: values.slice(i, j + 1), slope: slopes[i * n + j] };
      z[i * n + j] = mannKendall(preWhitened(part, r1).values).z;
    }
  }
  return z;
}
