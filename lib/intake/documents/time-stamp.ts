import { DAY_SECONDS, isoDate } from '../../calendar/day.ts';
import { dateProblem, dayOfParts, NO_DAY } from '../dates.ts';

/** Which days a value's time stamp stands for: the interval that begins with it, the one that ends with it, or the
 *  moment itself. */
export type StampMeaning = 'start' | 'end' | 'instant';

const NOON = DAY_SECONDS / 2;
const STAMP = /^(-?\d{4,})-(\d\d)(?:-(\d\d)(?:T(\d\d):(\d\d)(?::(\d\d)(?:[.,]\d+)?)?)?)?\s*(?:Z|[+-]\d\d(?::?\d\d)?)?$/;

/** A time stamp as read: a calendar day and the seconds after its midnight, both by the clock that wrote it. A time zone
 *  behind it says which clock that was and moves nothing. */
export class TimeStamp {
  day = 0;
  /** −1 where the stamp is a date alone */
  seconds = -1;

  /** @returns null when it was read, else why not */
  read(text: string): string | null {
    const parts = STAMP.exec(text);
    if (parts === null) return dateProblem(NO_DAY, text);
    if (parts[3] === undefined) return `“${text}” is a month, not a day`;
    const day = dayOfParts(Number(parts[1]), Number(parts[2]), Number(parts[3]));
    if (day <= NO_DAY) return dateProblem(day, text);
    this.day = day;
    this.seconds = -1;
    if (parts[4] === undefined) return null;
    const [hours, minutes, seconds] = [Number(parts[4]), Number(parts[5]), Number(parts[6] ?? 0)];
    // 24:00:00 is the midnight that ends the day (ISO 8601).
    if (hours > 24 || minutes > 59 || seconds > 60 || (hours === 24 && minutes + seconds > 0)) {
      return `“${text}” has no such time of day`;
    }
    this.day += hours === 24 ? 1 : 0;
    this.seconds = hours === 24 ? 0 : hours * 3600 + minutes * 60 + seconds;
    return null;
  }

  /** The day that a daily value belongs to: the one that holds most of its interval. A mean of the preceding day stamped
   *  at midnight belongs to the day before; a date without a time names its own day. */
  dailyDay(meaning: StampMeaning): number {
    if (this.seconds < 0 || meaning === 'instant') return this.day;
    if (meaning === 'end') return this.seconds < NOON ? this.day - 1 : this.day;
    return this.seconds > NOON ? this.day + 1 : this.day;
  }
}

/** Length of an ISO 8601 duration in days: P1D, PT24H → 1, PT15M → 0.0104…; null for none that means days, months of 30
 *  days and years of 365, which is enough to tell a day from longer or shorter. */
export function durationDays(text: string): number | null {
  const parts = /^P(?:(\d+)Y)?(?:(\d+)M)?(?:(\d+)W)?(?:(\d+)D)?(?:T(?:(\d+)H)?(?:(\d+)M)?(?:(\d+(?:\.\d+)?)S)?)?$/.exec(
    text.trim(),
  );
  if (parts === null) return null;
  const [years, months, weeks, days, hours, minutes, seconds] = parts.slice(1).map((part) => Number(part ?? 0));
  const length = years * 365 + months * 30 + weeks * 7 + days + (hours * 3600 + minutes * 60 + seconds) / DAY_SECONDS;
  return length > 0 ? length : null;
}

/** The time of a point that says none, in a series at equal steps.
 *  @param series  time of its first point and ISO 8601 duration between two, as written
 *  @param number  of the point, from 0
 *  @returns '' where the series does not say both */
export function spacedTime({ base, spacing }: { base: string; spacing: string }, number: number): string {
  const step = durationDays(spacing);
  const stamp = new TimeStamp();
  if (step === null || stamp.read(base) !== null) return '';
  const { day, seconds } = stamp;
  const after = Math.max(0, seconds) + Math.round(step * DAY_SECONDS) * number;
  const date = isoDate(day + Math.floor(after / DAY_SECONDS));
  if (seconds < 0 && step >= 1) return date;
  const two = (value: number) => String(Math.floor(value)).padStart(2, '0');
  const rest = after % DAY_SECONDS;
  return `${date}T${two(rest / 3600)}:${two((rest / 60) % 60)}:${two(rest % 60)}`;
}
