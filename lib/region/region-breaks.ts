import type { ResolvedBasis } from '../basis.ts';
import { median } from '../statistics/quantile.ts';
import type { Break, RegionBreaks, StationBreaks, StepTest } from './break-types.ts';
import { byCode } from './places.ts';
import type { Ranking } from './ranking-types.ts';
import { adjusted, stationBreaks } from './station-breaks.ts';

/** Levels between breaks at every ranked station that has one, by code, with p adjusted over all steps of the table, and
 *  how many stations are lower and higher after each. What the data suggest is not looked at here: among many stations
 *  some suggestion always looks good.
 *  @param breaksOf  the breaks of a station, years rising */
export function regionBreaks(
  { rows, basis }: Pick<Ranking, 'rows' | 'basis'>,
  breaksOf: (code: string) => readonly Break[],
): RegionBreaks {
  const found = rows
    .filter(({ rank }) => rank !== null)
    .map((row) => ({ row, breaks: breaksOf(row.code) }))
    .filter(({ breaks }) => breaks.length > 0)
    .map(({ row, breaks }) => stationBreaks(row, basis, breaks))
    .sort((a, b) => byCode(a.code, b.code));
  const stations = adjustedOverAll(found);
  return { stations, summary: summaryOf(stations, basis) };
}

function adjustedOverAll(stations: readonly StationBreaks[]): StationBreaks[] {
  const all = adjusted(stations.flatMap(({ steps }) => steps)).values();
  return stations.map((station) => ({ ...station, steps: station.steps.map(() => all.next().value as StepTest) }));
}

function summaryOf(stations: readonly StationBreaks[], { alpha }: ResolvedBasis): RegionBreaks['summary'] {
  const byLabel = new Map<string, StepTest[]>();
  const labelled = stations.flatMap(({ steps, leftOut }) => [
    ...steps.map((step) => ({ known: step.break, step })),
    ...leftOut.map(({ break: known }) => ({ known, step: null })),
  ]);
  for (const { known, step } of labelled) {
    const steps = byLabel.get(known.label) ?? [];
    if (step !== null && step.p !== null) steps.push(step);
    byLabel.set(known.label, steps);
  }
  return [...byLabel]
    .sort(([a], [b]) => byCode(a, b))
    .map(([label, steps]) => {
      const sure = steps.filter(({ pAdjusted }) => pAdjusted !== null && pAdjusted < alpha);
      const percents = steps.flatMap(({ percent }) => (percent === null ? [] : [percent]));
      return {
        label,
        tested: steps.length,
        lower: sure.filter(({ z }) => z !== null && z < 0).length,
        higher: sure.filter(({ z }) => z !== null && z > 0).length,
        medianPercent: percents.length ? median(percents) : null,
      };
    });
}
