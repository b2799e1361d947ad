import { isoDate } from '../calendar/day.ts';
import type { Finding, FindingKind } from '../checks/finding.ts';
import { rows, sharedConnection } from './connection.ts';
import { databasePath } from './database-url.ts';
import type { MarkSpan } from './marks-on-flags.ts';

export const FINDING_STATES = ['open', 'rejected', 'accepted', 'noted'] as const;
/** By the last mark on each day: rejected when all days are answered and one of them by a rejection, accepted when all are
 *  accepted, noted when notes and answers together lie over all of them; else open. */
export type FindingState = (typeof FINDING_STATES)[number];

/** A finding as stored, with where it stands. */
export interface StoredFinding extends Finding {
  /** kind and first day: the same after every check that finds it, and the only such one on its record */
  id: string;
  code: string;
  quantity: string;
  state: FindingState;
}

export interface FindingFilter {
  stationId?: number;
  kind?: FindingKind;
  state?: FindingState;
}

const FINDINGS = `SELECT f.stationId, s.code, f.quantity, f.kind, f.firstDay, f.lastDay, f.days, f.detail
  FROM Finding f JOIN Station s ON s.id = f.stationId
  JOIN Record r ON r.stationId = f.stationId AND r.quantity = f.quantity
  WHERE s.regionId = ? AND r.checked IS NOT NULL AND (? IS NULL OR f.stationId = ?) AND (? IS NULL OR f.kind = ?)
  ORDER BY s.code, f.firstDay, f.id`;

const MARKS = `SELECT m.stationId, m.quantity, m.firstDay, m.lastDay, m.kind FROM Mark m
  JOIN Station s ON s.id = m.stationId WHERE s.regionId = ? AND (? IS NULL OR m.stationId = ?) ORDER BY m.id`;

/** What the checks found on a region's records as they stand, by station and day. */
export function listFindings(
  regionId: number,
  { stationId, kind, state }: FindingFilter = {},
  path = databasePath(),
): StoredFinding[] {
  const connection = sharedConnection(path);
  const [ofStation, ofKind] = [stationId ?? null, kind ?? null];
  const marks = marksByRecord(rows(connection, MARKS).all([regionId, ofStation, ofStation]) as MarkRow[]);
  const found = rows(connection, FINDINGS).all([regionId, ofStation, ofStation, ofKind, ofKind]) as FindingRow[];
  return found
    .map(([station, code, quantity, of, firstDay, lastDay, days, detail]) => ({
      id: `${of}:${isoDate(firstDay)}`,
      ...{ code, quantity, kind: of, firstDay, lastDay, days, detail: JSON.parse(detail) as Finding['detail'] },
      state: stateOf({ firstDay, lastDay }, marks.get(`${station} ${quantity}`) ?? []),
    }))
    .filter((finding) => state === undefined || finding.state === state);
}

/** How many findings of one kind and state a station has. */
export interface FindingCount {
  kind: FindingKind;
  state: FindingState;
  count: number;
}

/** How many findings of which kinds and states each station of a region has, by code; stations without one are left out.
 *  Quick where listing the findings themselves is long. */
export function countFindings(regionId: number, path = databasePath()): { code: string; counts: FindingCount[] }[] {
  const connection = sharedConnection(path);
  const marks = marksByRecord(rows(connection, MARKS).all([regionId, null, null]) as MarkRow[]);
  const found = rows(connection, FINDINGS).all([regionId, null, null, null, null]) as FindingRow[];
  const byStation = new Map<string, Map<string, FindingCount>>();
  for (const [station, code, quantity, kind, firstDay, lastDay] of found) {
    const state = stateOf({ firstDay, lastDay }, marks.get(`${station} ${quantity}`) ?? []);
    const counts = byStation.get(code) ?? new Map<string, FindingCount>();
    const one = counts.get(`${kind} ${state}`) ?? { kind, state, count: 0 };
    one.count += 1;
    byStation.set(code, counts.set(`${kind} ${state}`, one));
  }
  return [...byStation].map(([code, counts]) => ({ code, counts: [...counts.values()] }));
}

type FindingRow = [number, string, string, FindingKind, number, number, number, string];
type MarkRow = [number, string, number, number, MarkSpan['kind']];

function marksByRecord(found: readonly MarkRow[]): Map<string, MarkSpan[]> {
  const byRecord = new Map<string, MarkSpan[]>();
  for (const [stationId, quantity, firstDay, lastDay, kind] of found) {
    const record = `${stationId} ${quantity}`;
    const marks = byRecord.get(record) ?? [];
    marks.push({ firstDay, lastDay, kind });
    byRecord.set(record, marks);
  }
  return byRecord;
}

/** Where a finding stands by the marks on its record, in the order in which they were made. */
export function stateOf(
  { firstDay, lastDay }: Pick<Finding, 'firstDay' | 'lastDay'>,
  marks: readonly MarkSpan[],
): FindingState {
  const over = marks.filter((mark) => mark.firstDay <= lastDay && mark.lastDay >= firstDay);
  if (over.length === 0) return 'open';
  // Between two edges of marks every day has the same ones: its first day speaks for all.
  const edges = over.flatMap((mark) => [mark.firstDay, mark.lastDay + 1]);
  const days = new Set([firstDay, ...edges.filter((day) => day > firstDay && day <= lastDay)]);
  const said = new Set<MarkSpan['kind'] | null>();
  for (const day of days) {
    const here = over.filter((mark) => mark.firstDay <= day && mark.lastDay >= day);
    said.add((here.findLast(({ kind }) => kind !== 'note') ?? here[0])?.kind ?? null);
  }
  if (said.has(null)) return 'open';
  if (said.has('note')) return 'noted';
  return said.has('reject') ? 'rejected' : 'accepted';
}
