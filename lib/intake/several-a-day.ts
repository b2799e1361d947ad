import { isoDate } from '../calendar/day.ts';
import { NO_TIME } from './time-of-day.ts';
import { IntakeError } from './types.ts';

/** Rows a day from which on they are readings, even where they say no time: if they are unlike, for rows that say the same
 *  are repeated. Two or three may be quantities that are not told apart. */
const MANY = 4;
/** Share of the days with several rows from which on a file is one of readings, and not of a few repeated rows. */
const SHARE = 0.1;

/** The rows of a day that stand one after the other. */
interface Day {
  day: number;
  second: number;
  /** NaN before there is one */
  value: number;
  rows: number;
  times: number;
}

/** Counts how the first rows of a file lie in their days. */
export class RowsOfDays {
  private readonly stations = new Map<number, Day>();
  private readonly steps = new Map<number, number>();
  private readonly rowsADay = new Map<number, number>();
  private days = 0;
  private timed = 0;
  /** a day has had rows with unlike values */
  private unlike = false;
  private first: { line: number; day: number } | null = null;

  /** @param second  of the day; NO_TIME where the row says none
   *  @param value   NaN where it is missing */
  add(station: number, day: number, second: number, value: number, line: number): void {
    const last = this.stations.get(station);
    if (last === undefined || last.day !== day) {
      if (last !== undefined) this.end(last);
      this.stations.set(station, { day, second, value, rows: 1, times: 1 });
      return;
    }
    last.rows++;
    if (Number.isNaN(last.value)) last.value = value;
    else if (!Number.isNaN(value) && value !== last.value) this.unlike = true;
    if (second !== last.second) {
      last.times++;
      const step = Math.abs(second - last.second);
      if (second !== NO_TIME && last.second !== NO_TIME) this.steps.set(step, (this.steps.get(step) ?? 0) + 1);
      last.second = second;
    }
    if (last.rows === 2) this.first ??= { line, day };
  }

  private end({ rows, times }: Day): void {
    this.days++;
    if (times > 1) this.timed++;
    this.rowsADay.set(rows, (this.rowsADay.get(rows) ?? 0) + 1);
  }

  /** The question that a file of readings asks; null for daily values.
   *  @param asked  true where two rows of one day with unlike values and times have been met already */
  problem(file: string, asked = false): IntakeError | null {
    for (const last of this.stations.values()) this.end(last);
    this.stations.clear();
    const usual = [...this.rowsADay].sort((a, b) => b[1] - a[1] || b[0] - a[0])[0]?.[0] ?? 1;
    const readings = this.timed > this.days * SHARE || (usual >= MANY && this.unlike);
    if (this.first === null || !(asked || readings)) return null;
    const step = [...this.steps].sort((a, b) => b[1] - a[1] || a[0] - b[0])[0]?.[0];
    const every = step === undefined ? '' : `, mostly every ${inWords(step)}`;
    return new IntakeError({
      file,
      row: this.first.line,
      value: isoDate(this.first.day),
      message: `the file has several values a day${every}${usual > 1 ? ` (${usual} on most days)` : ''}`,
      remedy:
        'Take their daily means, where enough of the day is covered: in a mapping {"dailyMean": 0.8}, for at least 80 % of it',
      needs: 'daily-mean',
    });
  }
}

/** An interval in words: "15 minutes", "1 hour". */
function inWords(seconds: number): string {
  const [count, noun] =
    seconds % 3600 === 0
      ? [seconds / 3600, 'hour']
      : seconds % 60 === 0
        ? [seconds / 60, 'minute']
        : [seconds, 'second'];
  return `${count} ${noun}${count === 1 ? '' : 's'}`;
}
