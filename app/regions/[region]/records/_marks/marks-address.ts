import { send } from '@/app/components/use-answer';
import type { MarkKind } from '@/lib/store/marks-on-flags';

/** What a person says about a stretch of days. */
export interface NewMark {
  kind: MarkKind;
  /** ISO dates, both included */
  first: string;
  last: string;
  reason: string;
  by: string;
}

export const marksAddress = (slug: string, code: string): string =>
  `/api/regions/${encodeURIComponent(slug)}/stations/${encodeURIComponent(code)}/marks`;

/** @throws AnswerError with the server's reason */
export const addMark = (slug: string, code: string, mark: NewMark) => send('POST', marksAddress(slug, code), mark);

/** The same mark on several stretches of one record: all of them or none.
 *  @throws AnswerError with the server's reason */
export const addMarks = (
  slug: string,
  code: string,
  mark: Omit<NewMark, 'first' | 'last'> & { stretches: Pick<NewMark, 'first' | 'last'>[] },
) => send('POST', marksAddress(slug, code), mark);

/** @throws AnswerError with the server's reason */
export const undoMark = (slug: string, code: string, id: number) => send('DELETE', `${marksAddress(slug, code)}/${id}`);

export const MARK_WORDS: Record<MarkKind, { verb: string; done: string; effect: string }> = {
  reject: {
    verb: 'Reject',
    done: 'rejected',
    effect: 'These days count as missing. Their values are kept, and undoing the mark brings them back.',
  },
  accept: {
    verb: 'Accept',
    done: 'accepted',
    effect: 'The check’s mark and earlier rejections no longer hold for these days.',
  },
  note: { verb: 'Note', done: 'noted', effect: 'A remark beside these days; nothing else changes.' },
};
