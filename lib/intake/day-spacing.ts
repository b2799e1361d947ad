import { IntakeError, type RejectedRow } from './types.ts';

/** Regular steps that are longer than a day: the word, and the days that lie between rows. */
const SPACINGS: [string, number, number][] = [
  ['week', 7, 7],
  ['month', 28, 31],
  ['quarter of a year', 90, 92],
  ['year', 365, 366],
];
/** Rows from which on their spacing says something: by three gaps a month is told from chance, other steps by more. */
const FEWEST_ROWS = 4;
const FEWEST_OF_ANY = 12;

/** How the days of a record are spaced, where that is regular and wider than a day: "one value a month".
 *  @param days  day numbers with a row, ascending
 *  @returns     null for daily records, however many gaps they have, and for rows too few or too uneven to say */
export function sparseSpacing(days: ArrayLike<number>): string | null {
  if (days.length < FEWEST_ROWS) return null;
  const gaps = Array.from({ length: days.length - 1 }, (_, at) => days[at + 1] - days[at]);
  if (gaps.some((gap) => gap < 2)) return null;
  const share = (low: number, high: number) => gaps.filter((gap) => gap >= low && gap <= high).length / gaps.length;
  const named = SPACINGS.find(([, low, high]) => share(low, high) >= 0.9);
  if (named) return `one value a ${named[0]}`;
  if (days.length < FEWEST_OF_ANY) return null;
  const usual = gaps.toSorted((a, b) => a - b)[gaps.length >> 1];
  return share(usual, usual) >= 0.9 ? `one value every ${usual} days` : null;
}

/** A file whose values are not daily: means over longer times say nothing of low flows of days. */
export function spacingProblem(file: string, code: string, spacing: string): IntakeError {
  return new IntakeError({
    file,
    value: code,
    message: `the file is not of daily flows: at station ${code} it has ${spacing}`,
    remedy: GET_DAILY,
  });
}

const GET_DAILY =
  'Get the daily values from whoever keeps the record; means of longer times cannot be taken apart into days';

/** A file whose dates are months. */
export function monthsProblem(file: string, { row, text }: RejectedRow): IntakeError {
  return new IntakeError({
    ...{ file, row, value: text.slice(0, 200) },
    message: 'the file is not of daily flows: its dates are months',
    remedy: GET_DAILY,
  });
}
