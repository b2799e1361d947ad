import { type CompletenessRule, END_YEARS, tooManyZeros, yearsNeeded } from './completeness.ts';
import type { ZeroRule } from './index-facts.ts';
import type { JudgedYears } from './used-years.ts';

/** How many stations would stay over every period. The counts of the period [firstYear + from, firstYear + to] stand at
 *  `from × years + to`; they are 0 where it is shorter than the rule's least, or runs backwards. */
export interface PeriodCounts {
  /** first usable year of any station; null when there is none */
  firstYear: number | null;
  /** years from it to the last usable year of any station */
  years: number;
  /** stations that would be ranked */
  ranked: Int32Array;
  /** stations that would be complete enough, whatever their share of zeros */
  complete: Int32Array;
}

/** How many stations would be ranked over every period, by the rules by which they are ranked: usable years ≥ minYears, and
 *  ≥ minCoverage of the period, of its first ten and of its last ten years; not too many zeros among their figures.
 *  @param zeroRule  how many zeros are too many: a third of the minima unless another index is compared
 *  @throws RangeError when `minYears` is not a whole number of at least 1 or `minCoverage` not in 0..1
 *  Time: stations × years², by running sums; 2,000 stations of 90 years take about a tenth of a second. */
export function commonPeriods(
  stations: readonly JudgedYears[],
  rule: CompletenessRule,
  zeroRule: ZeroRule = 'a-third',
): PeriodCounts {
  checkRule('commonPeriods', rule);
  const span = spanOfUsableYears(stations);
  if (span === null) return { firstYear: null, years: 0, ranked: new Int32Array(), complete: new Int32Array() };
  const years = span.last - span.first + 1;
  return { firstYear: span.first, years, ...countStations(stations, span.first, years, rule, zeroRule) };
}

/** @throws RangeError naming the caller for a rule that makes no sense */
export function checkRule(caller: string, { minYears, minCoverage }: CompletenessRule): void {
  if (!(Number.isInteger(minYears) && minYears >= 1)) {
    throw new RangeError(`${caller}: minYears must be a whole number of at least 1, got ${minYears}`);
  }
  if (!(minCoverage >= 0 && minCoverage <= 1)) {
    throw new RangeError(`${caller}: minCoverage must lie in 0..1, got ${minCoverage}`);
  }
}

function spanOfUsableYears(stations: readonly JudgedYears[]): { first: number; last: number } | null {
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

function countStations(
  stations: readonly JudgedYears[],
  firstYear: number,
  years: number,
  { minYears, minCoverage }: CompletenessRule,
  zeroRule: ZeroRule,
): { ranked: Int32Array; complete: Int32Array } {
  const ranked = new Int32Array(years * years);
  const complete = new Int32Array(years * years);
  const needed = Int32Array.from({ length: years + 1 }, (_, length) =>
    Math.max(minYears, yearsNeeded(minCoverage, length)),
  );
  // usable years, and zero figures among them, before each year
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
        if (!tooManyZeros(zerosBefore[to + 1] - zerosBefore[from], usable, zeroRule)) ranked[from * years + to]++;
      }
    }
  }
  return { ranked, complete };
}

function runningSums(station: JudgedYears, firstYear: number, usableBefore: Int32Array, zerosBefore: Int32Array) {
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
