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
/** A first look says no when it lies this many standard errors below the limit on Fisher's scale, with every second of the
 *  times it looked at taken for independent: a pair above the limit is missed less often than once in a hundred million. */
const STANDARD_ERRORS = 6;

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
      const look = correlationOver(looked, a * lookedTimes, b * lookedTimes, lookedTimes);
      if (isFarBelow(look, above)) continue;
      const { correlation, n } = correlationOver(values, a * times, b * times, times);
      if (n >= fewest && correlation > above) pairs.push({ a, b, correlation });
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

/** Whether a look at some of the times tells that the correlation over all of them is not above a limit. */
function isFarBelow({ correlation, n }: Correlation, limit: number): boolean {
  if (n < FEWEST_LOOKED_AT) return false;
  const standardError = 1 / Math.sqrt(n / 2 - 3);
  return correlation < Math.tanh(Math.atanh(limit) - STANDARD_ERRORS * standardError);
}

interface Correlation {
  /** NaN where either series is constant over the common times */
  correlation: number;
  /** times that both have */
  n: number;
}

function correlationOver(values: Float32Array, a: number, b: number, times: number): Correlation {
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
  const varianceX = n * sumXX - sumX * sumX;
  const varianceY = n * sumYY - sumY * sumY;
  const told = varianceX > 0 && varianceY > 0;
  return { correlation: told ? (n * sumXY - sumX * sumY) / Math.sqrt(varianceX * varianceY) : Number.NaN, n };
}
