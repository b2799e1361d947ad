import type { FindingKind } from '@/lib/checks/finding';
import type { FindingRow } from '@/lib/jobs/records-types';
import { fold } from '../../row-filter.ts';
import type { NamedStation } from '../records-screen.tsx';

export interface FindingFilter {
  kind: FindingKind | null;
  state: FindingRow['state'] | null;
  /** every word must stand in the station's code or name */
  search: string;
}

export interface StationFindings {
  station: NamedStation;
  findings: FindingRow[];
}

/** Findings that answer the filter, by station, the station with the most open ones first. */
export function groupFindings(
  findings: readonly FindingRow[],
  stations: readonly NamedStation[],
  { kind, state, search }: FindingFilter,
): StationFindings[] {
  const words = fold(search).split(/\s+/).filter(Boolean);
  const groups = new Map<string, StationFindings>();
  for (const station of stations) {
    const text = fold(`${station.code} ${station.name}`);
    if (words.every((word) => text.includes(word))) groups.set(station.code, { station, findings: [] });
  }
  for (const finding of findings) {
    if (kind !== null && finding.kind !== kind) continue;
    if (state !== null && finding.state !== state) continue;
    groups.get(finding.code)?.findings.push(finding);
  }
  const open = (group: StationFindings) => group.findings.filter((finding) => finding.state === 'open').length;
  return [...groups.values()]
    .filter((group) => group.findings.length > 0)
    .sort(
      (a, b) =>
        open(b) - open(a) || b.findings.length - a.findings.length || (a.station.code < b.station.code ? -1 : 1),
    );
}

/** How many findings there are of each kind and state, whatever the filter. */
export function countFindings(findings: readonly FindingRow[]): Record<FindingRow['state'], number> {
  const counts = { open: 0, rejected: 0, accepted: 0, noted: 0 };
  for (const { state } of findings) counts[state] += 1;
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
