import { whenFree } from './busy.ts';
import { StoreError } from './errors.ts';
import { MARK_KINDS, type MarkKind, type MarkSpan } from './marks-on-flags.ts';
import { openStore } from './open.ts';

/** A person's rejection, acceptance or note on a stretch of days. Laid over the record on reading; taking it away puts
 *  the record back. */
export interface MarkRow extends MarkSpan {
  id: number;
  stationId: number;
  quantity: string;
  reason: string;
  by: string;
  createdAt: Date;
}

/** The marks on a station's record, in the order in which they are laid. */
export async function listMarks(stationId: number, quantity = 'flow'): Promise<MarkRow[]> {
  const found = await openStore().prisma.mark.findMany({ where: { stationId, quantity }, orderBy: { id: 'asc' } });
  return found.map((row) => ({ ...row, kind: row.kind as MarkKind }));
}

/** Adds a mark on the days firstDay to lastDay (day numbers, both included).
 *  @throws StoreError 'bad-input' when the days run backwards, the kind is unknown or a rejection gives no reason */
export async function addMark(
  mark: MarkSpan & { stationId: number; quantity?: string; reason: string; by?: string },
): Promise<MarkRow> {
  const { stationId, quantity = 'flow', firstDay, lastDay, kind, by = '' } = mark;
  const reason = mark.reason.trim();
  if (!MARK_KINDS.includes(kind))
    throw new StoreError('bad-input', `A mark is ${MARK_KINDS.join(', ')}, not "${kind}".`);
  if (!(Number.isInteger(firstDay) && Number.isInteger(lastDay) && firstDay <= lastDay)) {
    throw new StoreError(
      'bad-input',
      `A mark runs from a first day to a last one, and ${firstDay}–${lastDay} does not.`,
    );
  }
  if (reason === '') throw new StoreError('bad-input', 'A mark needs a reason.');
  const data = { stationId, quantity, firstDay, lastDay, kind, reason, by };
  return { ...(await whenFree(() => openStore().prisma.mark.create({ data }))), kind };
}

/** Takes a mark away. @returns false when there is no such mark */
export async function removeMark(id: number): Promise<boolean> {
  const { count } = await whenFree(() => openStore().prisma.mark.deleteMany({ where: { id } }));
  return count > 0;
}
