import { averageRanks } from './ranks.ts';

/** Spearman's rank correlation: Pearson's of the average ranks, over the pairs in which neither value is missing.
 *  @param x  NaN where missing; left unchanged
 *  @param y  same length as `x`; left unchanged
 *  @returns  −1 to 1; NaN with fewer than 3 pairs, or where one of the two does not vary
 *  @throws RangeError when lengths differ
 *  Source: Spearman 1904, Am. J. Psychol. 15:72–101; ties by average ranks, Kendall 1970, Rank Correlation Methods.
 *  Example: [1, 2, 3, 4], [2, 1, 4, 3] → 0.6 */
export function rankCorrelation(x: ArrayLike<number>, y: ArrayLike<number>): number {
  if (x.length !== y.length) {
    throw new RangeError(`rankCorrelation: x and y must have the same length, got ${x.length} and ${y.length}`);
  }
  const both = Array.from(x, (_, i) => i).filter((i) => !Number.isNaN(x[i]) && !Number.isNaN(y[i]));
  if (both.length < 3) return Number.NaN;
  const ranksX = averageRanks(both.map((i) => x[i]));
  const ranksY = averageRanks(both.map((i) => y[i]));
  const middle = (both.length + 1) / 2;
  let [products, squaresX, squaresY] = [0, 0, 0];
  for (let i = 0; i < both.length; i++) {
    const [a, b] = [ranksX[i] - middle, ranksY[i] - middle];
    products += a * b;
    squaresX += a * a;
    squaresY += b * b;
  }
  return squaresX === 0 || squaresY === 0 ? Number.NaN : products / Math.sqrt(squaresX * squaresY);
}
