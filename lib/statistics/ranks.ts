/** Ranks from 1 (smallest); equal values share the mean of their ranks.
 *  @param x  NaN where missing; left unchanged
 *  @returns  same length as `x`; NaN where `x` is NaN, and the other values are ranked among themselves
 *  Example: [30, 10, 30, NaN] → [2.5, 1, 2.5, NaN] */
export function averageRanks(x: ArrayLike<number>): Float64Array {
  const ranks = new Float64Array(x.length).fill(Number.NaN);
  const order = Uint32Array.from(presentIndices(x)).sort((a, b) => x[a] - x[b]);
  for (let start = 0; start < order.length; ) {
    let end = start + 1;
    while (end < order.length && x[order[end]] === x[order[start]]) end++;
    // ranks start + 1 … end, whose mean is this
    const shared = (start + 1 + end) / 2;
    for (let place = start; place < end; place++) ranks[order[place]] = shared;
    start = end;
  }
  return ranks;
}

function presentIndices(x: ArrayLike<number>): number[] {
  const indices: number[] = [];
  for (let i = 0; i < x.length; i++) if (!Number.isNaN(x[i])) indices.push(i);
  return indices;
}
