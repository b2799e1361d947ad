import type { Basis, ResolvedBasis } from '../basis.ts';
import type { BreakChoice } from '../region/break-choice.ts';
import type { Break, RegionBreaks, StationBreaks } from '../region/break-types.ts';
import { breaksOfChanges, chosenBreaks, joinBreaks } from '../region/known-breaks.ts';
import { stationBreaks } from '../region/station-breaks.ts';
import { suggestedBreak } from '../region/suggested-break.ts';
import type { StationChange } from '../series/station-history.ts';
import type { RegionRow } from '../store/regions.ts';
import { listStationRows, type StationRow } from '../store/stations.ts';
import { cached } from './cached.ts';
import { runTask } from './pool.ts';
import { rankingOf } from './ranking.ts';
import { derivedKey } from './result-key.ts';

/** Before and after at one station, with what its figures suggest.
 *  @param station  with its dated changes */
export async function stationBreaksOf(
  region: Pick<RegionRow, 'id'>,
  basis: Basis,
  station: Pick<StationRow, 'code' | 'changes'>,
  choice: BreakChoice,
): Promise<{ breaks: StationBreaks; basis: ResolvedBasis; key: string }> {
  const { ranking, key } = await rankingOf(region, basis);
  const row = ranking.rows.find(({ code }) => code === station.code)!;
  const wanted = breaksOf(station.changes, choice, ranking.basis);
  const breaks = {
    ...stationBreaks(row, ranking.basis, wanted),
    suggested: suggestedBreak(row, ranking.basis),
  };
  return { breaks, basis: ranking.basis, key: derivedKey('station-breaks', key, station.code, JSON.stringify(wanted)) };
}

/** Before and after at every ranked station of a region that has one of the breaks. */
export async function regionBreaksOf(
  region: Pick<RegionRow, 'id'>,
  basis: Basis,
  choice: BreakChoice,
): Promise<{ breaks: RegionBreaks; basis: ResolvedBasis; key: string }> {
  const { ranking, key: rankingKey } = await rankingOf(region, basis);
  const stations = await listStationRows(region.id);
  const wanted = new Map(stations.map(({ code, changes }) => [code, breaksOf(changes, choice, ranking.basis)]));
  const key = derivedKey('breaks', rankingKey, JSON.stringify([...wanted]));
  const breaks = await cached('breaks', key, () =>
    runTask('regionBreaks', { rows: ranking.rows, basis: ranking.basis, breaks: wanted }),
  );
  return { breaks, basis: ranking.basis, key };
}

function breaksOf(changes: readonly StationChange[], choice: BreakChoice, { yearStart }: ResolvedBasis): Break[] {
  return joinBreaks(choice.changes ? breaksOfChanges(changes, yearStart) : [], chosenBreaks(choice.years, yearStart));
}
