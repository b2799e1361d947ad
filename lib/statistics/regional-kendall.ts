import { twoSidedP } from './normal.ts';
import { checkFactor } from './rank-sum.ts';
import { averageRanks } from './ranks.ts';

/** One site: rising times, the same scale at all sites, and a value for each; NaN where missing. */
export interface Site {
  years: ArrayLike<number>;
  values: ArrayLike<number>;
}

export interface RegionalKendallResult {
  /** sum of the sites' S */
  s: number;
  /** variance of S if the sites were independent: the sum of their own */
  varianceIndependent: number;
  /** variance of S with the covariance between sites, before `varianceFactor` */
  variance: number;
  /** (S ∓ 1)/√(varianceFactor·variance), corrected once on the total; 0 when S or the variance is 0 */
  z: number;
  /** two-sided; 1 when all values of each site are equal */
  p: number;
  /** S over the number of pairs within sites */
  tau: number;
}

/** Regional Kendall test: one common trend at all sites, which may share their weather.
 *  S = Σ S_g; its variance is the sum over all pairs of sites, each with itself too, of
 *  cov(S_g, S_h) = [K_gh + 4 Σ_i (R_ig − R̄_g)(R_ih − R̄_h)]/3, K_gh = Σ_{i<j} sign((x_jg − x_ig)(x_jh − x_ih)), R average
 *  ranks, a missing value with its site's mean rank and sign 0. A site with itself gives its variance corrected for ties.
 *  The sum over pairs of sites needs none of them singly: it is [Σ_{i<j} (Σ_g sign)² + 4 Σ_i (Σ_g (R − R̄))²]/3.
 *  @param varianceFactor  what the variance is multiplied by, for serial correlation
 *  @returns               NaN in variances, z, p and tau when no site has two values
 *  @throws RangeError     when lengths differ, times do not rise, a number is infinite or varianceFactor is not a positive
 *                         number
 *  Source: Helsel & Frans 2006, Environ. Sci. Technol. 40:4066–4073; covariance of Dietz & Killeen 1981, J. Am. Stat.
 *  Assoc. 76:169–174, with missing values as in Hirsch & Slack 1984, Water Resour. Res. 20:727–732. */
export function regionalKendall(sites: readonly Site[], varianceFactor = 1): RegionalKendallResult {
  checkFactor('regionalKendall', varianceFactor);
  sites.forEach(checkSite);
  const timeline = [...new Set(sites.flatMap(({ years }) => Array.from(years)))].sort((a, b) => a - b);
  const placeOf = new Map(timeline.map((year, place) => [year, place]));
  const span = timeline.length;
  // by pair of times: the sites that rise less those that fall; by time: the deviations of the sites' ranks, twice
  const signs = new Int32Array(span * span);
  const doubledDeviations = new Float64Array(span);
  let s = 0;
  let pairs = 0;
  // thirds, so that the sum stays whole
  let independentThirds = 0;
  for (const site of sites) {
    const { places, values } = placed(site, placeOf);
    const own = addSigns(signs, span, places, values);
    const squares = addDeviations(doubledDeviations, places, values);
    s += own.s;
    pairs += own.pairs;
    independentThirds += own.untied + squares;
  }
  if (pairs === 0) {
    return { s, varianceIndependent: Number.NaN, variance: Number.NaN, z: Number.NaN, p: Number.NaN, tau: Number.NaN };
  }
  const varianceIndependent = independentThirds / 3;
  const squaresOf = (sums: Int32Array | Float64Array) => {
    let total = 0;
    for (const sum of sums) total += sum * sum;
    return total;
  };
  const variance = (squaresOf(signs) + squaresOf(doubledDeviations)) / 3;
  const z = s === 0 || variance === 0 ? 0 : (s - Math.sign(s)) / Math.sqrt(varianceFactor * variance);
  return { s, varianceIndependent, variance, z, p: Math.min(1, twoSidedP(z)), tau: s / pairs };
}

/** Adds the sign of every pair of a site to the sums of all sites.
 *  @returns its S, and the pairs it has, tied ones counted or not */
function addSigns(signs: Int32Array, span: number, places: Int32Array, values: Float64Array) {
  let s = 0;
  let untied = 0;
  const n = values.length;
  for (let i = 0; i < n; i++) {
    const row = places[i] * span;
    const earlier = values[i];
    for (let j = i + 1; j < n; j++) {
      const later = values[j];
      if (later === earlier) continue;
      const sign = later > earlier ? 1 : -1;
      signs[row + places[j]] += sign;
      s += sign;
      untied++;
    }
  }
  return { s, untied, pairs: (n * (n - 1)) / 2 };
}

/** Adds 2(R − R̄) of a site to the sums of all sites: whole numbers, so that sums are exact.
 *  @returns Σ [2(R − R̄)]² of the site */
function addDeviations(doubledDeviations: Float64Array, places: Int32Array, values: Float64Array): number {
  let squares = 0;
  averageRanks(values).forEach((rank, i) => {
    const doubled = 2 * rank - (values.length + 1);
    doubledDeviations[places[i]] += doubled;
    squares += doubled * doubled;
  });
  return squares;
}

function placed({ years, values }: Site, placeOf: ReadonlyMap<number, number>) {
  const places = new Int32Array(values.length);
  const present = new Float64Array(values.length);
  let count = 0;
  for (let i = 0; i < values.length; i++) {
    if (Number.isNaN(values[i])) continue;
    places[count] = placeOf.get(years[i]) ?? 0;
    present[count++] = values[i];
  }
  return { places: places.subarray(0, count), values: present.subarray(0, count) };
}

function checkSite({ years, values }: Site, site: number): void {
  if (years.length !== values.length) {
    throw new RangeError(
      `regionalKendall: years and values of site ${site} must have the same length, got ${years.length} and ${values.length}`,
    );
  }
  for (let i = 0; i < years.length; i++) {
    if (!Number.isFinite(years[i]) || (i > 0 && !(years[i] > years[i - 1]))) {
      throw new RangeError(
        `regionalKendall: years of site ${site} must rise, got ${years[i]}${i > 0 ? ` after ${years[i - 1]}` : ''}`,
      );
    }
    if (!Number.isFinite(values[i]) && !Number.isNaN(values[i])) {
      throw new RangeError(
        `regionalKendall: values[${i}] of site ${site} must be a finite number or NaN, got ${values[i]}`,
      );
    }
  }
}
