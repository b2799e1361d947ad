import { YEARS_PER_DECADE } from '../calendar/decade.ts';
import type { RankingRow } from '../region/ranking-types.ts';
import type { SlopeLine } from './types.ts';

/** What a slope line is drawn from; `years` those that it rests on. */
export type Sloped = Pick<
  RankingRow,
  'firstYear' | 'lastYear' | 'valueSlope' | 'intercept' | 'valueSlopeLow' | 'valueSlopeHigh' | 'years'
>;

/** The slope line of a station's annual figures, in their unit, from its first to its last year used, with the lines of
 *  the slope's interval. The latter turn about the line's value at the median year, where the level is known best.
 *  @returns null for a station without a slope */
export function slopeLine(row: Sloped): SlopeLine | null {
  const { firstYear, lastYear, valueSlope, intercept, valueSlopeLow, valueSlopeHigh, years } = row;
  if (firstYear === null || lastYear === null || valueSlope === null || intercept === null) return null;
  const slope = valueSlope / YEARS_PER_DECADE;
  const at = (year: number) => intercept + slope * year;
  const pivot = (years[Math.floor((years.length - 1) / 2)] + years[Math.floor(years.length / 2)]) / 2;
  const turned = (perDecade: number | null): [number, number] | null => {
    if (perDecade === null) return null;
    const through = (year: number) => at(pivot) + (perDecade / YEARS_PER_DECADE) * (year - pivot);
    return [through(firstYear), through(lastYear)];
  };
  return {
    firstYear,
    lastYear,
    fitted: [at(firstYear), at(lastYear)],
    low: turned(valueSlopeLow),
    high: turned(valueSlopeHigh),
  };
}
