/** Mann–Kendall's S of every window of one series: of the values i to j, both included, at j·n + i for i ≤ j: windows
 *  that end alike lie side by side. */
export interface WindowScores {
  n: number;
  /** pairs that rise minus pairs that fall */
  s: Int32Array;
  /** Σ t(t − 1)(2t + 5) over the window's groups of t equal values: what ties take from 18·Var S */
  ties: Float64Array;
}

/** S and the tie term of all windows in one pass: adding value j to a window adds its signs and ties against the values
 *  before it, so that all n²/2 windows cost what a few single ones do.
 *  @param x  values in time order, none missing; left unchanged
 *  @throws RangeError when a value is not a finite number
 *  Source: as at `mannKendall`, with which every cell agrees.
 *  Example: [1, 3, 2] → S 1 of values 0 to 1, −1 of 1 to 2, 1 of 0 to 2 */
export function windowScores(x: ArrayLike<number>): WindowScores {
  const n = x.length;
  const s = new Int32Array(n * n);
  const ties = new Float64Array(n * n);
  for (let j = 0; j < n; j++) {
    const last = x[j];
    if (!Number.isFinite(last)) throw new RangeError(`windowScores: x[${j}] must be a finite number, got ${last}`);
    let signs = 0;
    let equal = 0;
    for (let i = j - 1; i >= 0; i--) {
      // without branches, for which way noise goes nobody can foretell
      const rises = Number(last > x[i]);
      const falls = Number(last < x[i]);
      signs += rises - falls;
      equal += 1 - rises - falls;
      const cell = j * n + i;
      s[cell] = s[cell - n] + signs;
      // one more in a group of `equal`: (t + 1)t(2t + 7) − t(t − 1)(2t + 5) = 6t² + 12t
      ties[cell] = ties[cell - n] + 6 * equal * (equal + 2);
    }
  }
  return { n, s, ties };
}

/** Var S of a window of m values under no trend, corrected for its ties. */
export function windowVariance(m: number, ties: number): number {
  return (m * (m - 1) * (2 * m + 5) - ties) / 18;
}
