import type { Finding, FindingKind } from '../checks/finding.ts';
import { rows, sharedConnection } from './connection.ts';
import { databasePath } from './database-url.ts';
import type { MarkSpan } from './marks-on-flags.ts';

export const FINDING_STATES = ['open', 'rejected', 'accepted', 'noted'] as const;
/** open: no mark lies over the whole stretch; rejected or accepted: by the last such mark over it; noted: there are but
 *  notes */
export type FindingState = (typeof FINDING_STATES)[number];

/** A finding as stored, with where it stands. */
export interface StoredFinding extends Finding {
  id: number;
  code: string;
  quantity: string;
  state: FindingState;
}

export interface FindingFilter {
  stationId?: number;
  kind?: FindingKind;
  state?: FindingState;
}

const FINDINGS = `SELECT f.id, f.stationId, s.code, f.quantity, f.kind, f.firstDay, f.lastDay, f.days, f.detail
  FROM Finding f JOIN Station s ON s.id = f.stationId
  JOIN Record r ON r.stationId = f.stationId AND r.quantity = f.quantity
  WHERE s.regionId = ? AND r.checked IS NOT NULL AND (? IS NULL OR f.stationId = ?) AND (? IS NULL OR f.kind = ?)
  ORDER BY s.code, f.firstDay, f.id`;

const MARKS = `SELECT m.stationId, m.quantity, m.firstDay, m.lastDay, m.kind FROM Mark m
  JOIN Station s ON s.id = m.stationId WHERE s.regionId = ? ORDER BY m.id`;

/** What the checks found on a region's records as they stand, by station and day. */
export function listFindings(
  regionId: number,
  { stationId, kind, state }: FindingFilter = {},
  path = databasePath(),
): StoredFinding[] {
  const connection = sharedConnection(path);
  const marks = marksByRecord(rows(connection, MARKS).all([regionId]) as MarkRow[]);
  const [ofStation, ofKind] = [stationId ?? null, kind ?? null];
  const found = rows(connection, FINDINGS).all([regionId, ofStation, ofStation, ofKind, ofKind]) as FindingRow[];
  return found
    .map(([id, station, code, quantity, of, firstDay, lastDay, days, detail]) => ({
      ...{ id, code, quantity, kind: of, firstDay, lastDay, days, detail: JSON.parse(detail) as Finding['detail'] },
      state: stateOf({ firstDay, lastDay }, marks.get(`${station} ${quantity}`) ?? []),
    }))
    .filter((finding) => state === undefined || finding.state === state);
}

type FindingRow = [number, number, string, string, FindingKind, number, number, number, string];
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
  const over = marks.filter((mark) => mark.firstDay <= firstDay && mark.lastDay >= lastDay);
  const answer = over.findLast(({ kind }) => kind !== 'note');
  if (answer) return answer.kind === 'reject' ? 'rejected' : 'accepted';
  return over.length > 0 ? 'noted' : 'open';
}
