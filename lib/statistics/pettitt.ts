import { presentValues } from './present-values.ts';
import { averageRanks } from './ranks.ts';

/** Where a series changes its level, if it does. */
export interface ChangePoint {
  /** largest |U| */
  k: number;
  /** U at that place; above 0 where the later part is the lower one */
  u: number;
  /** index of the last value of the first part: of equal places the first */
  at: number;
  /** two-sided, approximate: good below 0.5 */
  p: number;
}

/** Pettitt's test for one change of level at an unknown place.
 *
 *  U_t = 2 Σ_{i ≤ t} R_i − t(n + 1) with average ranks R; K = max |U_t|; p = min(1, 2 exp(−6K²/(n³ + n²))). It takes the
 *  values for independent: serial correlation and a straight trend give false alarms.
 *  @param x  values in the order of time, NaN where missing: left out
 *  @returns  NaN for k, u and p, and −1 for the place, when there is no value
 *  Source: Pettitt 1979, A non-parametric approach to the change-point problem, Appl. Stat. 28:126–135.
 *  Example: [9, 8, 9.5, 8.5, 9.2, 3, 2, 3.5, 2.5, 2.2] → k 25, at 4, p 0.066 */
export function pettitt(x: ArrayLike<number>): ChangePoint {
  const values = presentValues(x, 'pettitt');
  const n = values.length;
  if (n === 0) return { k: Number.NaN, u: Number.NaN, at: -1, p: Number.NaN };
  const ranks = averageRanks(values);
  let best = -1;
  let uBest = 0;
  let at = 0;
  let u = 0;
  for (let t = 0; t < n; t++) {
    u += 2 * ranks[t] - (n + 1);
    if (Math.abs(u) <= best) continue;
    best = Math.abs(u);
    uBest = u;
    at = t;
  }
  const p = Math.min(1, 2 * Math.exp((-6 * best ** 2) / (n ** 3 + n ** 2)));
  return { k: best, u: uBest, at: indexAmongAll(x, at), p };
}

/** Index in `x` of its present value number `place`. */
function indexAmongAll(x: ArrayLike<number>, place: number): number {
  let seen = -1;
  for (let i = 0; i < x.length; i++) {
    if (!Number.isNaN(x[i])) seen++;
    if (seen === place) return i;
  }
  return -1;
}
