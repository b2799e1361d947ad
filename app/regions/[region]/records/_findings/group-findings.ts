import type { FindingKind } from '@/lib/checks/finding';
import type { FindingRow } from '@/lib/jobs/records-types';
import type { FindingCount } from '@/lib/store/findings';
import { fold } from '../../row-filter.ts';
import type { NamedStation } from '../records-screen.tsx';

export interface FindingFilter {
  kind: FindingKind | null;
  state: FindingRow['state'] | null;
  /** every word must stand in the station's code or name */
  search: string;
}

/** How many findings a station has. */
export interface StationCounts {
  code: string;
  counts: readonly FindingCount[];
}

export interface FindingGroup {
  station: NamedStation;
  /** findings that answer the filter, and how many of them are open */
  count: number;
  open: number;
}

/** Whether a finding, or a count of such, is one that is asked for. */
export const answersFilter = (
  finding: Pick<FindingRow, 'kind' | 'state'>,
  { kind, state }: Pick<FindingFilter, 'kind' | 'state'>,
): boolean => (kind === null || finding.kind === kind) && (state === null || finding.state === state);

/** Stations with findings that answer the filter, the one with the most open ones first.
 *  @param first  code of a station that a link leads to: it stands before all others, whatever the search */
export function groupFindings(
  byStation: readonly StationCounts[],
  stations: readonly NamedStation[],
  filter: FindingFilter,
  first: string | null = null,
): FindingGroup[] {
  const words = fold(filter.search).split(/\s+/).filter(Boolean);
  const known = new Map(stations.map((station) => [station.code, station]));
  const groups = byStation.flatMap(({ code, counts }): FindingGroup[] => {
    const station = known.get(code);
    if (!station) return [];
    const text = fold(`${code} ${station.name}`);
    if (code !== first && !words.every((word) => text.includes(word))) return [];
    const sum = (some: readonly FindingCount[]) => some.reduce((total, { count }) => total + count, 0);
    const asked = counts.filter((one) => answersFilter(one, filter));
    return [{ station, count: sum(asked), open: sum(asked.filter(({ state }) => state === 'open')) }];
  });
  const place = ({ station }: FindingGroup) => (station.code === first ? 0 : 1);
  return groups
    .filter(({ count }) => count > 0)
    .sort(
      (a, b) =>
        place(a) - place(b) || b.open - a.open || b.count - a.count || (a.station.code < b.station.code ? -1 : 1),
    );
}

/** How many findings there are of each state, whatever the filter. */
export function countFindings(byStation: readonly StationCounts[]): Record<FindingRow['state'], number> {
  const counts = { open: 0, rejected: 0, accepted: 0, noted: 0 };
  for (const { state, count } of byStation.flatMap((station) => station.counts)) counts[state] += count;
  return counts;
}

/** Days on each side of a step in the annual mean: ten years, or it could not be seen. */
const STEP_ROOM = 3652;

/** Days shown around a finding, so that it is seen against its neighbourhood: as many as it is long on each side, at
 *  least 20 and at most 400. A stretch longer than ten years is shown from its beginning.
 *  @returns day numbers, both included */
export function surroundings(kind: FindingKind, first: number, last: number): [number, number] {
  if (kind === 'step') return [first - STEP_ROOM, last + STEP_ROOM];
  const end = Math.min(last, first + 3652);
  const room = Math.min(400, Math.max(20, end - first + 1));
  return [first - room, end + room];
}
