import { largestPeriod } from '../../region/common-period.ts';
import { commonPeriods as countPeriods, type PeriodCounts } from '../../region/common-periods.ts';
import type { CompletenessRule } from '../../region/completeness.ts';
import { type PackedMinima, unpackMinima } from '../pack-minima.ts';

/** How many stations would stay over every period, and the one that "common" comes to. */
export function commonPeriods(task: { minima: PackedMinima; rule: CompletenessRule }): PeriodCounts & {
  common: [number, number] | null;
} {
  const counts = countPeriods([...unpackMinima(task.minima).values()], task.rule);
  return { ...counts, common: largestPeriod(counts, task.rule).period };
}
