import { type Sloped, slopeLine } from '@/lib/jobs/slope-line';
import type { SlopeLine } from '@/lib/jobs/types';
import type { PairTrend } from '@/lib/region/pair-types';

/** The slope line of a trend over the years that it rests on; null without a slope.
 *  @param factor  from the trend's unit to the one shown */
export function trendLine(trend: PairTrend | null, years: readonly number[], factor = 1): SlopeLine | null {
  if (!trend || years.length === 0) return null;
  const times = (value: number | null) => (value === null ? null : value * factor);
  const sloped: Sloped = {
    ...{ firstYear: years[0], lastYear: years[years.length - 1], years: [...years] },
    valueSlope: times(trend.slopePerDecade),
    intercept: times(trend.intercept),
    valueSlopeLow: times(trend.low),
    valueSlopeHigh: times(trend.high),
  };
  return slopeLine(sloped);
}

/** In which colour a trend is drawn: none where it is not significant. */
export function toneOf(trend: PairTrend | null, alpha: number, moreIsDrier = false): 'dry' | 'wet' | 'none' {
  if (!trend || trend.z === null || !((trend.p ?? 1) < alpha)) return 'none';
  return trend.z > 0 === moreIsDrier ? 'dry' : 'wet';
}
