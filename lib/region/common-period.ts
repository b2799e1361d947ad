import type { AnnualMinima } from '../lowflow/annual-minima-types.ts';
import { type CompletenessRule, END_YEARS, tooManyZeros, yearsNeeded } from './completeness.ts';

export interface CommonPeriod {
  /** [first, last] low-flow years; null when the usable years of the region span less than `minYears` */
  period: [number, number] | null;
  /** stations that would be ranked over it */
  ranked: number;
}

/** The period that makes most of a region's records: of all [first, last] at least `minYears` long, the one with the
 *  largest (stations that would be ranked) × (years). Ties: the later last year, then the earlier first.
 *  Only years between the first and the last usable year of any station are looked at. Where no period would let any
 *  station be ranked, those that only their zeros keep out count instead, so that intermittent rivers too are compared
 *  over common years.
 *  @throws RangeError when `minYears` is not a whole number of at least 1 or `minCoverage` not in 0..1
 *  Time: stations × years², by running sums; 2,000 stations of 90 years take about a tenth of a second. */
export function commonPeriod(stations: readonly AnnualMinima[], rule: CompletenessRule): CommonPeriod {
  const { minYears, minCoverage } = rule;
  if (!(Number.isInteger(minYears) && minYears >= 1)) {
    throw new RangeError(`commonPeriod: minYears must be a whole number of at least 1, got ${minYears}`);
  }
  if (!(minCoverage >= 0 && minCoverage <= 1)) {
    throw new RangeError(`commonPeriod: minCoverage must lie in 0..1, got ${minCoverage}`);
  }
  const span = spanOfUsableYears(stations);
  if (span === null || span.last - span.first + 1 < minYears) return { period: null, ranked: 0 };
  const years = span.last - span.first + 1;
  const { ranked, complete } = countStations(stations, span.first, years, rule);
  const best = largestWindow(ranked, years, minYears) ?? largestWindow(complete, years, minYears);
  const [from, to] = best ?? [0, years - 1];
  return { period: [span.first + from, span.first + to], ranked: ranked[from * years + to] };
}

function spanOfUsableYears(stations: readonly AnnualMinima[]): { first: number; last: number } | null {
  let first = Number.POSITIVE_INFINITY;
  let last = Number.NEGATIVE_INFINITY;
  for (const { years, usable } of stations) {
    const from = usable.indexOf(1);
    if (from < 0) continue;
    first = Math.min(first, years[from]);
    last = Math.max(last, years[usable.lastIndexOf(1)]);
  }
  return first <= last ? { first, last } : null;
}

/** For every window [from, to], at `from * years + to`: the stations that would be ranked, and those complete enough,
 *  whatever their zeros. */
function countStations(
  stations: readonly AnnualMinima[],
  firstYear: number,
  years: number,
  { minYears, minCoverage }: CompletenessRule,
): { ranked: Int32Array; complete: Int32Array } {
  const ranked = new Int32Array(years * years);
  const complete = new Int32Array(years * years);
  const needed = Int32Array.from({ length: years + 1 }, (_, length) =>
    Math.max(minYears, yearsNeeded(minCoverage, length)),
  );
  // usable years, and zero minima among them, before each year
  const usableBefore = new Int32Array(years + 1);
  const zerosBefore = new Int32Array(years + 1);
  for (const station of stations) {
    runningSums(station, firstYear, usableBefore, zerosBefore);
    for (let from = 0; from + minYears <= years; from++) {
      for (let to = from + minYears - 1; to < years; to++) {
        const length = to - from + 1;
        const usable = usableBefore[to + 1] - usableBefore[from];
        if (usable < needed[length]) continue;
        const end = Math.min(END_YEARS, length);
        const neededOfEnd = yearsNeeded(minCoverage, end);
        if (usableBefore[from + end] - usableBefore[from] < neededOfEnd) continue;
        if (usableBefore[to + 1] - usableBefore[to + 1 - end] < neededOfEnd) continue;
        complete[from * years + to]++;
        if (!tooManyZeros(zerosBefore[to + 1] - zerosBefore[from], usable)) ranked[from * years + to]++;
      }
    }
  }
  return { ranked, complete };
}

function runningSums(station: AnnualMinima, firstYear: number, usableBefore: Int32Array, zerosBefore: Int32Array) {
  usableBefore.fill(0);
  zerosBefore.fill(0);
  for (let i = 0; i < station.years.length; i++) {
    if (station.usable[i] !== 1) continue;
    const after = station.years[i] - firstYear + 1;
    usableBefore[after] = 1;
    zerosBefore[after] = station.minimum[i] === 0 ? 1 : 0;
  }
  for (let year = 1; year < usableBefore.length; year++) {
    usableBefore[year] += usableBefore[year - 1];
    zerosBefore[year] += zerosBefore[year - 1];
  }
}

/** The window with the largest count × length; null when every count is 0. */
function largestWindow(counts: Int32Array, years: number, minYears: number): [number, number] | null {
  let best: [number, number] | null = null;
  let largest = 0;
  // by falling last year and then rising first year, so that of equal windows the first met is the one to take
  for (let to = years - 1; to >= 0; to--) {
    for (let from = 0; from + minYears - 1 <= to; from++) {
      const size = counts[from * years + to] * (to - from + 1);
      if (size <= largest) continue;
      largest = size;
      best = [from, to];
    }
  }
  return best;
}
