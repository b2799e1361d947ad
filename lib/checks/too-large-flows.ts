import type { DailySeries } from '../series/daily-series.ts';
import type { Finding } from './finding.ts';
import { extremeOf, stretchesAbove } from './stretches.ts';

/** More than a catchment can give for a whole day, m³/s/km²: 2.6 m of water over the area. */
export const LARGEST_SPECIFIC_DISCHARGE = 30;

/** Stretches of days with more water than the drainage area can give; none where the area is not known.
 *  @returns detail: `highest`, m³/s; `specific`, the same over the area, and `limit`, m³/s/km² */
export function tooLargeFlows({ firstDay, values }: DailySeries, areaKm2: number | null): Finding[] {
  if (areaKm2 === null || !(areaKm2 > 0)) return [];
  return stretchesAbove(values, LARGEST_SPECIFIC_DISCHARGE * areaKm2).map(([from, to]) => {
    const highest = extremeOf(values, [from, to]);
    return {
      ...{ kind: 'too-large', firstDay: firstDay + from, lastDay: firstDay + to, days: to - from + 1 },
      detail: { highest, specific: highest / areaKm2, limit: LARGEST_SPECIFIC_DISCHARGE },
    };
  });
}
