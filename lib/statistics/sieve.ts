import { type RandomStream, randomStream } from './random.ts';

/** Years that a replicate runs before its first year, so that its start from 0 is forgotten. */
const RUN_IN_YEARS = 30;

/** √(m/(m − 2)) needs more innovations than two. */
const FEWEST_INNOVATIONS = 3;

/** What the series of a sieve share. Plain data: the same in every thread. */
export interface SieveTerms {
  /** lag-1 correlation of the autoregression, 0 to below 1 */
  r: number;
  /** the years over which a replicate runs */
  firstYear: number;
  lastYear: number;
  /** years to draw from: those in which at least one series has an innovation; rising */
  sourceYears: Int32Array;
}

/** One series without its trend. */
export interface SieveSeries {
  /** whole years, rising, gaps allowed, inside the years of the terms */
  years: ArrayLike<number>;
  /** one value a year about 0: see sieveResiduals */
  residuals: ArrayLike<number>;
}

/** The replicates of one series, one after the other. */
export interface Replicates {
  /** entries of a replicate: one for every year from the series' first to its last */
  length: number;
  /** Writes the next replicate: the residuals e* year by year, NaN in the series' gaps.
   *  @param out  `length` long
   *  @throws RangeError when all replicates were taken */
  next(out: Float64Array): void;
}

/** A sieve with its years drawn. */
export interface Sieve {
  replicates: number;
  /** The replicates of one series; of several series, replicate number k is drawn from the same years.
   *  @param label  names the series' own draws, for years in which it has no innovation: a station's code
   *  @returns      null when the series has fewer than three innovations: too few consecutive years
   *  @throws RangeError when lengths differ, years do not rise or leave the terms' years, or a residual is not finite */
  of(series: SieveSeries, label: string): Replicates | null;
}

/** Residuals of a series about its slope line, centred: x − b·t less its mean.
 *  @param series  whole `years`, rising; a value for each; `slope` in units of value per year
 *  @throws RangeError when lengths differ or a number is not finite */
export function sieveResiduals(series: {
  years: ArrayLike<number>;
  values: ArrayLike<number>;
  slope: number;
}): Float64Array {
  const { years, values, slope } = series;
  if (years.length !== values.length) {
    throw new RangeError(
      `sieveResiduals: years and values must have the same length, got ${years.length} and ${values.length}`,
    );
  }
  const rest = Float64Array.from(values, (value, i) => {
    const residual = value - slope * (years[i] - years[0]);
    if (Number.isFinite(residual)) return residual;
    throw new RangeError(`sieveResiduals: value and slope must be finite, got ${value} in ${years[i]} and ${slope}`);
  });
  const mean = rest.reduce((sum, each) => sum + each, 0) / rest.length;
  return rest.map((each) => each - mean);
}

/** The terms for series that are resampled together.
 *  @param years  the years of each series, whole and rising
 *  @param r      lag-1 correlation for all of them; NaN, where none can be told, counts as 0
 *  @throws RangeError when there is no year at all, or r is not 0 to below 1 */
export function sieveTerms(years: readonly ArrayLike<number>[], r: number): SieveTerms {
  if (!Number.isNaN(r) && !(r >= 0 && r < 1)) throw new RangeError(`sieveTerms: r must lie in 0..1, got ${r}`);
  const sources = new Set<number>();
  let firstYear = Number.POSITIVE_INFINITY;
  let lastYear = Number.NEGATIVE_INFINITY;
  for (const each of years) {
    for (let i = 0; i < each.length; i++) {
      firstYear = Math.min(firstYear, each[i]);
      lastYear = Math.max(lastYear, each[i]);
      if (i > 0 && each[i] === each[i - 1] + 1) sources.add(each[i]);
    }
  }
  if (!(firstYear <= lastYear)) throw new RangeError('sieveTerms: there is no year in any series');
  return { r: Number.isNaN(r) ? 0 : r, firstYear, lastYear, sourceYears: Int32Array.from(sources).sort() };
}

/** Sieve bootstrap of yearly series by a first-order autoregression.
 *
 *  Innovations u_t = e_t − r·e_{t−1} where both years are there, centred, × √(m/(m − 2)) with m their number. A replicate
 *  draws years with replacement, the same for all series, so that they stay correlated as they are; a series without an
 *  innovation in a year drawn takes one of its own. From 30 years before the first on, e*_t = r·e*_{t−1} + u*_t; then the
 *  series' gaps are cut out. A slope line is put back by the caller: e* + a + b·t, or nothing for a world without trend.
 *  @param terms       see sieveTerms; equal in every thread, whichever series it works on
 *  @param seed        with the label of a series it fixes every draw: the division of labour changes nothing
 *  @param replicates  a whole number of at least 1
 *  @throws RangeError when `replicates` is out of its range
 *  Source: Bühlmann 1997, Sieve bootstrap for time series, Bernoulli 3:123–148.
 *  Example: sieve(sieveTerms([years], 0.3), 'seed', 500).of({ years, residuals }, 'A1')?.next(out) */
export function sieve(terms: SieveTerms, seed: string, replicates: number): Sieve {
  if (!(Number.isInteger(replicates) && replicates >= 1)) {
    throw new RangeError(`sieve: replicates must be a whole number of at least 1, got ${replicates}`);
  }
  const draws = yearDraws(terms, seed, replicates);
  return {
    replicates,
    of(series, label) {
      checkSeries(series, terms);
      const innovations = innovationsOf(series, terms);
      return innovations && replicatesOf(series, innovations, terms, draws, randomStream(seed, 'sieve', label));
    },
  };
}

/** For each replicate and each of its years, run-in first, the place in `sourceYears` that is drawn. */
function yearDraws({ sourceYears, firstYear, lastYear }: SieveTerms, seed: string, replicates: number): Int32Array {
  const sources = sourceYears.length;
  if (sources === 0) return new Int32Array(0);
  const random = randomStream(seed, 'sieve years');
  return new Int32Array(replicates * (RUN_IN_YEARS + lastYear - firstYear + 1)).map(() => random.below(sources));
}

/** Innovations of a series by place in `sourceYears`, NaN where it has none, and those it has, one after the other. */
interface Innovations {
  bySource: Float64Array;
  own: Float64Array;
}

function innovationsOf({ years, residuals }: SieveSeries, { r, sourceYears }: SieveTerms): Innovations | null {
  const bySource = new Float64Array(sourceYears.length).fill(Number.NaN);
  let sum = 0;
  let count = 0;
  for (let i = 1, source = 0; i < years.length; i++) {
    if (years[i] !== years[i - 1] + 1) continue;
    while (sourceYears[source] < years[i]) source++;
    const innovation = residuals[i] - r * residuals[i - 1];
    bySource[source] = innovation;
    sum += innovation;
    count++;
  }
  if (count < FEWEST_INNOVATIONS) return null;
  const mean = sum / count;
  const stretch = Math.sqrt(count / (count - 2));
  const scaled = bySource.map((innovation) => (innovation - mean) * stretch);
  return { bySource: scaled, own: scaled.filter((innovation) => !Number.isNaN(innovation)) };
}

function replicatesOf(
  { years }: SieveSeries,
  { bySource, own }: Innovations,
  { r, firstYear, lastYear }: SieveTerms,
  draws: Int32Array,
  random: RandomStream,
): Replicates {
  const first = years[0];
  const length = years[years.length - 1] - first + 1;
  const gaps = gapsOf(years);
  const before = RUN_IN_YEARS + first - firstYear;
  const after = lastYear - years[years.length - 1];
  let next = 0;
  return {
    length,
    next(out) {
      if (next >= draws.length) throw new RangeError('sieve: all replicates were taken');
      let e = 0;
      const step = () => {
        const drawn = bySource[draws[next++]];
        e = r * e + (Number.isNaN(drawn) ? own[random.below(own.length)] : drawn);
        return e;
      };
      for (let i = 0; i < before; i++) step();
      for (let i = 0; i < length; i++) out[i] = step();
      next += after;
      for (const gap of gaps) out[gap] = Number.NaN;
    },
  };
}

/** Places of the years that are missing between the first and the last. */
function gapsOf(years: ArrayLike<number>): Int32Array {
  const gaps: number[] = [];
  for (let i = 1; i < years.length; i++) {
    for (let year = years[i - 1] + 1; year < years[i]; year++) gaps.push(year - years[0]);
  }
  return Int32Array.from(gaps);
}

function checkSeries({ years, residuals }: SieveSeries, { firstYear, lastYear }: SieveTerms): void {
  const n = years.length;
  if (residuals.length !== n) {
    throw new RangeError(`sieve: years and residuals must have the same length, got ${n} and ${residuals.length}`);
  }
  for (let i = 0; i < n; i++) {
    if (!(years[i] >= firstYear && years[i] <= lastYear && (i === 0 || years[i] > years[i - 1]))) {
      throw new RangeError(`sieve: years must rise within ${firstYear}..${lastYear}, got ${years[i]} at place ${i}`);
    }
    if (!Number.isFinite(residuals[i])) {
      throw new RangeError(`sieve: residuals[${i}] must be a finite number, got ${residuals[i]}`);
    }
  }
}
