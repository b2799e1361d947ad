import { seasonSpan } from '../../calendar/season.ts';
import type { MinimaOptions } from '../../lowflow/annual-minima.ts';
import { annualMinima } from '../../lowflow/annual-minima.ts';
import { FLAG } from '../../series/daily-series.ts';
import { readSeries } from '../../store/records.ts';
import type { YearCoverage } from '../types.ts';

/** How complete one station's record is, low-flow year by low-flow year (or its season); none without a record.
 *  @returns `hash`: of the record as read, null without one */
export function coverage(task: { stationId: number; options: MinimaOptions }): {
  years: YearCoverage[];
  hash: string | null;
} {
  const { options } = task;
  let years: YearCoverage[] = [];
  let readHash: string | null = null;
  readSeries([task.stationId], (_, series, hash) => {
    readHash = hash;
    const minima = annualMinima(series, options);
    years = Array.from(minima.years, (year, i) => {
      const { first, last } = seasonSpan(year, options.yearStart, options.season);
      const days = last - first + 1;
      const from = Math.max(0, first - series.firstDay);
      const flags = series.flags.subarray(from, Math.max(from, last + 1 - series.firstDay));
      const missingDays = minima.missingDays[i];
      return {
        year,
        state: minima.usable[i] === 1 ? 'usable' : missingDays < days ? 'partial' : 'missing',
        days,
        missingDays,
        flagged: {
          estimated: countBit(flags, FLAG.estimated),
          provisional: countBit(flags, FLAG.provisional),
          ice: countBit(flags, FLAG.ice),
          belowDetection: countBit(flags, FLAG['below-detection']),
          suspect: countBit(flags, FLAG.suspect),
          rejected: countBit(flags, FLAG.rejected),
        },
        reason: minima.reason[i],
      };
    });
  });
  return { years, hash: readHash };
}

function countBit(flags: Uint8Array, bit: number): number {
  let count = 0;
  for (const bits of flags) if ((bits & bit) !== 0) count += 1;
  return count;
}
