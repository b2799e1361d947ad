import { isoDate } from '../calendar/day.ts';
import type { Quantity } from '../series/quantities.ts';
import type { StoredFinding } from '../store/findings.ts';
import type { MarkRow } from '../store/marks.ts';
import type { FindingRow, MarkView } from './records-types.ts';

/** A finding as it is answered: days as ISO dates. */
export const findingRow = ({ firstDay, lastDay, quantity, ...rest }: StoredFinding): FindingRow => ({
  ...rest,
  quantity: quantity as Quantity,
  first: isoDate(firstDay),
  last: isoDate(lastDay),
});

/** A mark as it is answered: days as ISO dates, and when it was made as an ISO instant. */
export const markView = ({
  id,
  code,
  quantity,
  kind,
  firstDay,
  lastDay,
  reason,
  by,
  createdAt,
}: MarkRow): MarkView => ({
  ...{ id, code, quantity: quantity as Quantity, kind, reason, by },
  first: isoDate(firstDay),
  last: isoDate(lastDay),
  createdAt: createdAt.toISOString(),
});
