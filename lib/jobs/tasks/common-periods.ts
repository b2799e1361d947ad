import type { AnnualIndexName } from '../../basis.ts';
import { largestPeriod } from '../../region/common-period.ts';
import { commonPeriods as countPeriods, type PeriodCounts } from '../../region/common-periods.ts';
import type { CompletenessRule } from '../../region/completeness.ts';
import { INDEX_FACTS } from '../../region/index-facts.ts';
import { judgedYears } from '../../region/used-years.ts';
import { figuresByStation, type PackedMinima, unpackMinima } from '../pack-minima.ts';

/** How many stations would stay over every period, and the one that "common" comes to.
 *  @param task.figures  the index where the minima do not bring it along, one a year of the packed minima */
export function commonPeriods(task: {
  minima: PackedMinima;
  figures: Float64Array | null;
  index: AnnualIndexName;
  rule: CompletenessRule;
}): PeriodCounts & { common: [number, number] | null } {
  const figures = task.figures && figuresByStation(task.minima, task.figures);
  const stations = [...unpackMinima(task.minima)].map(([id, minima]) =>
    judgedYears(minima, task.index, figures?.get(id) ?? null),
  );
  const counts = countPeriods(stations, task.rule, INDEX_FACTS[task.index].zeroRule);
  return { ...counts, common: largestPeriod(counts, task.rule).period };
}
