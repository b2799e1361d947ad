export interface CorrelatedPairsTask {
  /** series by series, `times` values each over the same times, NaN where missing */
  values: Float32Array;
  times: number;
  /** pairs are told whose correlation is above this */
  above: number;
  /** fewest times that both series of a pair must have */
  fewest: number;
  /** only pairs whose first series is one of these places; all by default */
  from?: number;
  to?: number;
}

export interface CorrelatedPair {
  /** places of the two series, a < b */
  a: number;
  b: number;
  /** Pearson's r over the times that both have */
  correlation: number;
}

/** A first look takes every eighth time. */
const STRIDE = 8;
/** It settles nothing over fewer times than this. */
const FEWEST_LOOKED_AT = 30;
/** A pair above the limit is this far below it in a first look less often than once in a million: with r = 0.95 over 30
 *  values the look has a standard error of 0.19 on Fisher's scale, where 0.95 lies 1.8 and 0.95 − 0.3 lies 0.8 from 0. */
const SLACK = 0.3;

/** The pairs of many series whose correlation over their common times is above a limit. Most pairs are far from it, which a
 *  look at every eighth time tells; the others are computed from all.
 *  @returns by a, then b; a pair of which one series is constant over the common times is never among them
 *  @throws RangeError when `values` does not hold whole series */
export function correlatedPairs(task: CorrelatedPairsTask): CorrelatedPair[] {
  const { values, times, above, fewest } = task;
  const series = times === 0 ? 0 : values.length / times;
  if (!Number.isInteger(series)) {
    throw new RangeError(`correlatedPairs: values must hold whole series of ${times}, got ${values.length} values`);
  }
  const looked = everyEighth(values, times);
  const lookedTimes = looked.length / Math.max(1, series);
  const pairs: CorrelatedPair[] = [];
  for (let a = task.from ?? 0; a < (task.to ?? series); a++) {
    for (let b = a + 1; b < series; b++) {
      const look = correlationOver(looked, a * lookedTimes, b * lookedTimes, lookedTimes, FEWEST_LOOKED_AT);
      if (look < above - SLACK) continue;
      const correlation = correlationOver(values, a * times, b * times, times, fewest);
      if (correlation > above) pairs.push({ a, b, correlation });
    }
  }
  return pairs;
}

function everyEighth(values: Float32Array, times: number): Float32Array {
  const kept = Math.ceil(times / STRIDE);
  const looked = new Float32Array(times === 0 ? 0 : (values.length / times) * kept);
  for (let i = 0; i < looked.length; i++) looked[i] = values[Math.floor(i / kept) * times + (i % kept) * STRIDE];
  return looked;
}

/** NaN when fewer than `fewest` times are common, or either series is constant over them. */
function correlationOver(values: Float32Array, a: number, b: number, times: number, fewest: number): number {
  let n = 0;
  let sumX = 0;
  let sumY = 0;
  let sumXX = 0;
  let sumYY = 0;
  let sumXY = 0;
  for (let t = 0; t < times; t++) {
    const x = values[a + t];
    const y = values[b + t];
    const product = x * y;
    if (Number.isNaN(product)) continue;
    n++;
    sumX += x;
    sumY += y;
    sumXX += x * x;
    sumYY += y * y;
    sumXY += product;
  }
  if (n < fewest) return Number.NaN;
  const [varianceX, varianceY] = [n * sumXX - sumX * sumX, n * sumYY - sumY * sumY];
  if (!(varianceX > 0 && varianceY > 0)) return Number.NaN;
  return (n * sumXY - sumX * sumY) / Math.sqrt(varianceX * varianceY);
}
