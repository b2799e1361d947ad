/** Kendall's tau-b of two lists: concordant less discordant pairs, over the pairs not tied in the one times those not tied
 *  in the other, root of it.
 *  @param x  numbers, none missing; left unchanged
 *  @param y  same length as `x`; left unchanged
 *  @returns  −1 to 1; NaN with fewer than 2 values, or where all of one list are equal
 *  @throws RangeError when lengths differ or a value is NaN
 *  Source: Kendall 1945, The treatment of ties in ranking problems, Biometrika 33:239–251.
 *  Example: [1, 2, 3, 4], [1, 3, 2, 4] → 2/3 */
export function kendallTauB(x: ArrayLike<number>, y: ArrayLike<number>): number {
  const n = x.length;
  if (y.length !== n) {
    throw new RangeError(`kendallTauB: x and y must have the same length, got ${n} and ${y.length}`);
  }
  let s = 0;
  let untiedX = 0;
  let untiedY = 0;
  for (let i = 0; i < n; i++) {
    if (Number.isNaN(x[i]) || Number.isNaN(y[i])) {
      throw new RangeError(`kendallTauB: value ${i} must be a number, got x ${x[i]} and y ${y[i]}`);
    }
    for (let j = i + 1; j < n; j++) {
      const ofX = Math.sign(x[j] - x[i]);
      const ofY = Math.sign(y[j] - y[i]);
      s += ofX * ofY;
      untiedX += ofX * ofX;
      untiedY += ofY * ofY;
    }
  }
  // 0/0 is NaN: all of a list are equal, or there is no pair
  return s / Math.sqrt(untiedX * untiedY);
}
