import { monthsProblem } from './day-spacing.ts';
import { RecordSink } from './record-sink.ts';
import type { Rejections } from './rejections.ts';
import type { RowLoop } from './rows/row-loop.ts';
import type { DaySink } from './rows/row-reader.ts';
import type { TableReading } from './table-reading.ts';
import { type ImportReport, IntakeError, type Quantity } from './types.ts';

/** What a person should know of a file that has been read well. */
export function readingWarnings(loop: RowLoop, reading: TableReading, sink: DaySink, quantity: Quantity): string[] {
  const { filled, otherCodes, alike } = sink instanceof RecordSink ? sink : { filled: 0, otherCodes: 0, alike: 0 };
  // Levels below a gauge's zero are nothing unusual.
  const negatives = quantity === 'stage' ? 0 : reading.values.negatives;
  const warnings: [number, (count: number) => string][] = [
    [negatives, (count) => `${count} values are negative; they were taken as written.`],
    [reading.leftOut(), (count) => `${count} rows of other quantities were left out.`],
    [alike, (count) => `${count} days stand twice with equal values; they were taken once.`],
    [filled, (count) => `${count} days stand twice, once with a value and once without; the value was taken.`],
    [otherCodes, (count) => `${count} days stand twice with equal values and unlike flags; the first flag was kept.`],
    [
      loop.headersAgain,
      (count) => `The header stands again ${count} times between the rows; those lines were skipped.`,
    ],
    [loop.endsOpen ? 1 : 0, () => 'The last row has no line end: make sure that the file was not cut short.'],
  ];
  return warnings.flatMap(([count, words]) => (count > 0 ? [words(count)] : []));
}

/** What a further quantity's reading could not take: its rows are not among those that the report counts. */
export function unreadWarnings({ rejectedTotal, rejected }: ImportReport): string[] {
  if (rejectedTotal === 0) return [];
  return [`${rejectedTotal} rows cannot be read, the first of them row ${rejected[0].row}: ${rejected[0].reason}.`];
}

/** A row whose date is a month: 2001-03, 3/2001. */
const MONTH = /(?:^|[,;\t "])(?:\d{4}[-/.]\d{1,2}|\d{1,2}[-/.]\d{4})(?=[,;\t "]|$)/;

/** Refuses a file of which no row was taken. */
export function nothingTaken(file: string, rows: number, rejections: Rejections): IntakeError {
  const first = rejections.first[0];
  if (first === undefined) {
    return new IntakeError({
      file,
      message: 'no row of the file holds a flow',
      remedy: 'Check that it is a file of daily flows, and the mapping if one was given',
    });
  }
  if (rejections.first.every(({ text }) => MONTH.test(text))) return monthsProblem(file, first);
  return new IntakeError({
    file,
    row: first.row,
    value: first.text.slice(0, 200),
    message: `none of its ${rows} rows can be read; of the first, ${first.reason}`,
    remedy: 'Check the layout, and give a mapping where it was taken for another',
    rows: rejections.first,
  });
}
