import type { Conflict } from './count-revisions.ts';
import { ImportRefused } from './import-refused.ts';
import type { Revisions } from './revisions.ts';

/** A file whose values are unlike those that stand, and nobody said what becomes of them. Nothing of the import was
 *  taken. */
export class OverlapError extends ImportRefused {
  override name = 'OverlapError';
  constructor(
    file: string,
    /** the first unlike days */
    readonly first: readonly Conflict[],
    /** what the file would do to the days that stand */
    readonly revisions: Revisions,
    /** the same of the import's other files of which it holds */
    readonly others: readonly OverlapError[] = [],
  ) {
    const { unlike } = revisions;
    const shown = first.map(
      ({ code, date, standing, other, unit }) =>
        `station ${code} on ${date} has ${plain(standing)} ${unit}, the file ${plain(other)}`,
    );
    super({
      file,
      message: `${unlike} ${unlike === 1 ? 'day holds another value' : 'days hold other values'} already: ${shown.join('; ')}${
        unlike > first.length ? '; …' : ''
      }`,
      remedy:
        'Say what becomes of these days: --rule keep (the old values stay), --rule take-new (or --revise), or --rule take-where-provisional; on the screen, choose the same',
      needs: 'revise',
    });
  }
}

const plain = (value: number): string => String(Number(value.toPrecision(10)));
