import { isoDate } from '../calendar/day.ts';
import { ImportRefused } from './import-refused.ts';

/** A day on which a file has another value than the record. Both in the record's unit. */
export interface Conflict {
  code: string;
  /** ISO date */
  date: string;
  standing: number;
  other: number;
  unit: string;
}

/** Counts conflicts by file, keeping the first of each. */
export class Conflicts {
  readonly files = new Map<number, { count: number; first: Conflict[] }>();

  add(file: number, at: Omit<Conflict, 'date'> & { day: number }): void {
    const entry = this.files.get(file) ?? { count: 0, first: [] };
    this.files.set(file, entry);
    entry.count++;
    const { day, ...rest } = at;
    if (entry.first.length < SHOWN) entry.first.push({ ...rest, date: isoDate(day) });
  }
}

const SHOWN = 3;

/** A file whose values are unlike those that stand. Nothing of the import was taken. */
export class OverlapError extends ImportRefused {
  override name = 'OverlapError';
  constructor(
    file: string,
    readonly count: number,
    readonly first: readonly Conflict[],
  ) {
    const shown = first.map(
      ({ code, date, standing, other, unit }) =>
        `station ${code} on ${date} has ${plain(standing)} ${unit}, the file ${plain(other)}`,
    );
    super({
      file,
      message: `${count} ${count === 1 ? 'day holds another value' : 'days hold other values'} already: ${shown.join('; ')}${
        count > first.length ? '; …' : ''
      }`,
      remedy:
        'To take the new values, import the file with --revise (on the screen: “take the new values”); to keep the old ones, leave these days out of the file',
      needs: 'revise',
    });
  }
}

const plain = (value: number): string => String(Number(value.toPrecision(10)));
