/** Kendall's tau-b with time of x + slope·t, for a replicate whose trend is laid on afterwards.
 *  @param x      one entry a time step, NaN where missing (left out)
 *  @param slope  per time step
 *  @returns      NaN with fewer than 2 values or when all are equal
 *  Source: Kendall 1975, Rank Correlation Methods; the steps themselves are never tied.
 *  Example: x = [1, NaN, 1], slope 0.5 → 1 */
export function tauOnSlope(x: Float64Array, slope: number): number {
  const { length } = x;
  let rises = 0;
  let falls = 0;
  let values = 0;
  for (let i = 0; i < length; i++) {
    const earlier = x[i];
    values += Number(!Number.isNaN(earlier));
    for (let j = i + 1; j < length; j++) {
      // NaN neither rises nor falls
      const change = x[j] - earlier + slope * (j - i);
      rises += Number(change > 0);
      falls += Number(change < 0);
    }
  }
  const pairs = (values * (values - 1)) / 2;
  return (rises - falls) / Math.sqrt(pairs * (rises + falls));
}
