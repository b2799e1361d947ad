import { FIRST_YEAR, LAST_YEAR } from './dates.ts';
import { monthOfName } from './month-names.ts';

export interface YearMonth {
  year: number;
  month: number;
}

const isYear = (year: number): boolean => year >= FIRST_YEAR && year <= LAST_YEAR;

/** Year and month of a field that holds both: `2001-03`, `03/2001`, `200103`, `Mar 2001`, `2001-03-01`; null for any other
 *  text. */
export function parseYearMonth(text: string): YearMonth | null {
  const answer = (year: string, month: number): YearMonth | null =>
    isYear(Number(year)) && month >= 1 && month <= 12 ? { year: Number(year), month } : null;
  const yearFirst = /^(\d{4})[-/. ]?(\d{1,2})(?:[-/.]0?1(?:[T ]00:00.*)?)?$/.exec(text);
  if (yearFirst) return answer(yearFirst[1], Number(yearFirst[2]));
  const yearLast = /^(\d{1,2})[-/. ](\d{4})$/.exec(text);
  if (yearLast) return answer(yearLast[2], Number(yearLast[1]));
  const nameFirst = /^(\p{L}{3,12})\.?[-/, ]*(\d{4})$/u.exec(text);
  if (nameFirst) return answer(nameFirst[2], monthOfName(nameFirst[1]));
  const nameLast = /^(\d{4})[-/. ]*(\p{L}{3,12})\.?$/u.exec(text);
  return nameLast ? answer(nameLast[1], monthOfName(nameLast[2])) : null;
}

/** The year of a heading line above a block of days. */
export interface HeadingYear {
  year: number;
  /** it says two years, "2000/01": `year` is the first of them */
  spans: boolean;
  /** its words say that the year is not the calendar's */
  hydrological: boolean;
}

const YEAR_WORDS =
  'year|jahr|kalenderjahr|annee|année|año|ano|anno|år|jaar|abflussjahr|hydrologisches jahr|water ?year|année hydrologique|año hidrológico|ano hidrológico';
const NAMED = new RegExp(
  `(?<!\\p{L})(${YEAR_WORDS})(?!\\p{L})[^\\p{L}\\d]*(\\d{4})(?:\\s*[-/–]\\s*(\\d{4}|\\d{2}))?(?!\\d)`,
  'iu',
);
const BARE = /^[^\p{L}\d]*(\d{4})(?:\s*[-/–]\s*(\d{4}|\d{2}))?[^\p{L}\d]*$/u;

/** The year that a heading line names ("Year 2001", "1987", "Water year 2000/01"); null when it names none. */
export function yearOfHeading(text: string): HeadingYear | null {
  const named = NAMED.exec(text);
  const found = named ?? BARE.exec(text);
  if (found === null) return null;
  const [from, to] = named ? [named[2], named[3]] : [found[1], found[2]];
  const year = Number(from);
  if (!isYear(year)) return null;
  if (to !== undefined && Number(to) % 100 !== (year + 1) % 100) return null;
  const hydrological = named !== null && /water|hydro|hidro|abfluss/i.test(text);
  return { year, spans: to !== undefined, hydrological };
}
