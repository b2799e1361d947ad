import { checkRule, commonPeriods, type PeriodCounts } from './common-periods.ts';
import type { CompletenessRule } from './completeness.ts';
import type { ZeroRule } from './index-facts.ts';
import type { JudgedYears } from './used-years.ts';

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
 *  @param zeroRule  see commonPeriods
 *  @throws RangeError when `minYears` is not a whole number of at least 1 or `minCoverage` not in 0..1 */
export function commonPeriod(
  stations: readonly JudgedYears[],
  rule: CompletenessRule,
  zeroRule: ZeroRule = 'a-third',
): CommonPeriod {
  checkRule('commonPeriod', rule);
  return largestPeriod(commonPeriods(stations, rule, zeroRule), rule);
}

/** The same where the counts of every period are known already, by the same rule. */
export function largestPeriod(counts: PeriodCounts, rule: CompletenessRule): CommonPeriod {
  const { firstYear, years, ranked, complete } = counts;
  if (firstYear === null || years < rule.minYears) return { period: null, ranked: 0 };
  const best = largestWindow(ranked, years, rule.minYears) ?? largestWindow(complete, years, rule.minYears);
  const [from, to] = best ?? [0, years - 1];
  return { period: [firstYear + from, firstYear + to], ranked: ranked[from * years + to] };
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
