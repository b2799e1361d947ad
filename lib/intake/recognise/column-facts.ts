import { FIRST_YEAR, LAST_YEAR } from '../dates.ts';
import { isMissingText } from '../missing-codes.ts';
import { monthOfName, namedDate } from '../month-names.ts';
import { type HeadingRole, roleOfHeading } from './heading-roles.ts';
import type { SampleRow } from './sample.ts';

/** What the sampled rows show of one column. Shares are of the filled fields, 0 to 1. */
export interface ColumnFacts {
  position: number;
  heading: string;
  role: HeadingRole;
  filled: number;
  dates: number;
  /** numbers and missing codes */
  numbers: number;
  years: number;
  months: number;
  days: number;
  distinct: number;
  samples: string[];
}

const YEAR_FIRST = /^\d{4}[-/.]\d{1,2}[-/.]\d{1,2}(?:[T ]\d.*|Z)?$/;
const YEAR_LAST = /^\d{1,2}[-/.]\d{1,2}[-/.]\d{2,4}(?:[T ]\d.*)?$/;
const SHORT_YEAR = /^\d{1,2}[-/.]\d{1,2}[-/.]\d{1,2}(?:[T ]\d.*)?$/;
const COMPACT = /^(?:1[789]|2[01])\d\d(?:0[1-9]|1[0-2])(?:0[1-9]|[12]\d|3[01])$/;
/** Groups of three digits: `1,234.5`, `1.234.567`, `1 234`, `1'234` */
const GROUPED = /^[+-]?\d{1,3}(?:([,. \u00a0\u202f'’])\d{3})(?:\1\d{3})*(?:[.,]\d+)?$/;
const NUMBER = /^[+-]?(?:\d+[.,]?\d*|[.,]\d+)(?:[eE][+-]?\d+)?$/;

/** A date as one field, whether or not there is such a day: `30/2/2001` is a date gone wrong, not a number. */
export function looksLikeDate(text: string): boolean {
  return YEAR_FIRST.test(text) || YEAR_LAST.test(text) || COMPACT.test(text) || isNamedDate(text);
}

const isNamedDate = (text: string): boolean => text.length >= 6 && /\p{L}{3}/u.test(text) && namedDate(text) !== null;

/** A date whose year has two digits: it may lie in any hundred years. */
export function hasShortYear(text: string): boolean {
  return SHORT_YEAR.test(text) || (isNamedDate(text) && namedDate(text)?.short === true);
}

/** A number with whatever decimal sign and separators of thousands. */
export function looksLikeNumber(text: string): boolean {
  return NUMBER.test(text) || GROUPED.test(text);
}

/** Whole number between two bounds, as a year, month or day in a column of its own. */
function isWholeBetween(text: string, low: number, high: number): boolean {
  return /^\d{1,4}$/.test(text) && Number(text) >= low && Number(text) <= high;
}

export const isYear = (text: string): boolean => isWholeBetween(text, FIRST_YEAR, LAST_YEAR);
/** A month as a number or a name. */
export const isMonth = (text: string): boolean => isWholeBetween(text, 1, 12) || monthOfName(text) > 0;
export const isDay = (text: string): boolean => isWholeBetween(text, 1, 31);

/** Facts of every column of the sampled data rows. */
export function columnFacts(
  rows: readonly SampleRow[],
  header: readonly string[] | null,
  count: number,
): ColumnFacts[] {
  return Array.from({ length: count }, (_, position) => {
    const texts = rows.map(({ fields }) => fields[position] ?? '').filter((text) => text !== '');
    const share = (test: (text: string) => boolean) =>
      texts.length === 0 ? 0 : texts.filter(test).length / texts.length;
    const heading = header?.[position] ?? '';
    return {
      position,
      heading,
      role: heading === '' ? 'unknown' : roleOfHeading(heading),
      filled: texts.length,
      dates: share(looksLikeDate),
      numbers: share((text) => looksLikeNumber(text) || text.startsWith('<') || isMissingText(text)),
      years: share(isYear),
      months: share(isMonth),
      days: share(isDay),
      distinct: new Set(texts).size,
      samples: texts.slice(0, 5),
    };
  });
}
