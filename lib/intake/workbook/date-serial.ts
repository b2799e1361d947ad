import { DAY_SECONDS, dayNumber, isoDate } from '../../calendar/day.ts';

/** Day 0 of the two systems of serial dates. In the older one the year 1900 has a 29 February that never was: serials
 *  from 61 on are one too high. Source: ECMA-376 (5th edition), part 1, 18.17.4.1. */
const DAY_0_OF_1900 = dayNumber(1899, 12, 31);
const FALSE_LEAP_DAY = 60;
const DAY_0_OF_1904 = dayNumber(1904, 1, 1);
/** Serial of 9999-12-31, the last that a spreadsheet shows. */
const LAST_SERIAL = 2_958_465;

/** What the number format of a cell shows of a serial date. */
export type DateKind = 'date' | 'time' | 'date-time';

/** What a number format shows: a date, a time of day, both; null for numbers.
 *  @param id    number of the format
 *  @param code  its code, where it is not one of those that every workbook has */
export function dateKind(id: number, code: string | undefined): DateKind | null {
  if (code === undefined) {
    if (
      (id >= 14 && id <= 17) ||
      (id >= 27 && id <= 31) ||
      id === 36 ||
      (id >= 50 && id <= 54) ||
      id === 57 ||
      id === 58
    )
      return 'date';
    if (id === 22) return 'date-time';
    return (id >= 18 && id <= 21) || (id >= 32 && id <= 35) || (id >= 45 && id <= 47) || id === 55 || id === 56
      ? 'time'
      : null;
  }
  const first = code.split(';')[0];
  // A length of time ([h]:mm) is no time of day.
  if (/\[(?:h+|m+|s+)\]/i.test(first)) return null;
  const shown = first.replace(/"[^"]*"?|\\.|_.|\*.|\[[^\]]*\]/g, '').toLowerCase();
  if (/general|standard|[0#?]/.test(shown.replace(/[hs][^a-z]*[.,]0+/g, 'h'))) return null;
  const hasTime = /[hs]|am\/pm/.test(shown);
  const hasDate = /[ydje]|mmm/.test(shown) || (/m/.test(shown) && !hasTime);
  return hasDate ? (hasTime ? 'date-time' : 'date') : hasTime ? 'time' : null;
}

/** A serial date as ISO text: a date, with a time of day where there is one or the format shows one.
 *  @param from1904  the workbook counts from 1904
 *  @returns         null for a number that is no day: then it is a number
 *  Example: 44197 → 2021-01-01; 60 → 1900-02-29, a day that never was, for the reader to refuse by name */
export function serialText(serial: number, kind: DateKind, from1904: boolean): string | null {
  if (!(serial >= 0) || serial > LAST_SERIAL + 1) return null;
  let whole = Math.floor(serial);
  let seconds = Math.round((serial - whole) * DAY_SECONDS);
  if (seconds === DAY_SECONDS) {
    whole++;
    seconds = 0;
  }
  if (kind === 'time' && whole === 0) return clock(seconds);
  const time = seconds > 0 || kind !== 'date' ? `T${clock(seconds)}` : '';
  if (from1904) return `${isoDate(DAY_0_OF_1904 + whole)}${time}`;
  if (whole === FALSE_LEAP_DAY) return `1900-02-29${time}`;
  return `${isoDate(DAY_0_OF_1900 + whole - (whole > FALSE_LEAP_DAY ? 1 : 0))}${time}`;
}

function clock(seconds: number): string {
  const two = (value: number) => String(Math.floor(value)).padStart(2, '0');
  return `${two(seconds / 3600)}:${two((seconds / 60) % 60)}:${two(seconds % 60)}`;
}
