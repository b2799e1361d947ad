import { DAY_SECONDS, isoDate } from '../../calendar/day.ts';
import { NO_ROW } from '../../series/day-codes.ts';
import { DailyMeans } from '../daily-means.ts';
import { spacingProblem, sparseSpacing } from '../day-spacing.ts';
import type { PageMemory } from '../page-memory.ts';
import { stagedPart } from '../report.ts';
import { RowsOfDays } from '../several-a-day.ts';
import { OTHER_VALUE, StationDays } from '../station-days.ts';
import { NO_TIME } from '../time-of-day.ts';
import { IntakeError, type Quantity, type StagedPart, type Unit } from '../types.ts';
import type { DayCodes, PointCode } from './day-codes.ts';
import type { SeriesHead } from './series-head.ts';
import type { TimeStamp } from './time-stamp.ts';

/** Points from which on it is plain how many readings a day a series has. */
const PLAIN_AFTER = 500;

/** The days of one station and quantity, from one series of the document or several. */
export class SeriesRecord {
  readonly codes: DayCodes;
  private readonly days: StationDays;
  private readonly means: DailyMeans | null;
  private readonly readings = new RowsOfDays();
  private lastDay = Number.NaN;
  private lastSeconds = NO_TIME;
  /** two values of one day at different times have been met: the file is of readings */
  private severalADay = false;
  private points = 0;
  /** the daily means of readings, between `check` and `part` */
  private joined: StagedPart | null = null;

  constructor(
    private readonly about: { file: string; code: string; quantity: Quantity; unit: Unit },
    codes: DayCodes,
    options: { memory: PageMemory; dailyMean: number | undefined },
  ) {
    this.codes = codes;
    this.days = new StationDays(options.memory);
    this.means = options.dailyMean === undefined ? null : new DailyMeans(codes.codes, options.dailyMean);
  }

  get unit(): Unit {
    return this.about.unit;
  }

  get duplicates(): number {
    return this.days.duplicates;
  }

  /** Days whose readings covered too little. */
  get thinDays(): number {
    return this.means?.thinDays ?? 0;
  }

  /** Puts a point in its place.
   *  @param number  of the point, for messages
   *  @throws IntakeError for unlike values of one time, and for several values a day unless their means were asked for */
  put(head: SeriesHead, stamp: TimeStamp, value: number, point: PointCode, number: number): void {
    const code = this.codes.number(point);
    const { seconds } = stamp;
    const day = stamp.dailyDay(head.meaning);
    if (this.means !== null) {
      const isDaily = head.stepDays !== null && head.stepDays >= 0.99;
      // A reading of the time before midnight is the last of the day that it ends.
      const endsDay = !isDaily && head.meaning === 'end' && seconds === 0;
      this.means.second = endsDay ? DAY_SECONDS : seconds;
      this.means.take(0, isDaily ? day : endsDay ? stamp.day - 1 : stamp.day, value, code);
      return;
    }
    this.points++;
    if (this.points <= PLAIN_AFTER) this.readings.add(0, stamp.day, seconds, value, number);
    if (stamp.day === this.lastDay && seconds !== this.lastSeconds) this.severalADay = true;
    this.lastDay = stamp.day;
    this.lastSeconds = seconds;
    if (this.severalADay) {
      if (this.points >= PLAIN_AFTER) this.refuseReadings();
      return;
    }
    if (this.days.put(day, value, code) === OTHER_VALUE) throw this.conflict(day, value, number);
  }

  /** Finds what stands against taking the days, before any record is handed on.
   *  @throws IntakeError for several values a day, and for values that are regularly further apart than a day */
  check(): void {
    if (this.severalADay) this.refuseReadings();
    const { file, code, unit } = this.about;
    this.joined = this.means?.part(0, { code, unit }) ?? null;
    const run = this.joined ?? this.days.run();
    if (run === null) return;
    const spacing = sparseSpacing(daysWithRows(run));
    if (spacing) throw spacingProblem(file, code, spacing);
  }

  /** The days as one part, and the record's memory back; null when there were none. Comes after `check`. */
  part(): StagedPart | null {
    const { code, unit, quantity } = this.about;
    const run = this.joined === null ? this.days.run() : null;
    const part = run === null ? this.joined : stagedPart(code, unit, run, this.codes.codes);
    this.days.clear();
    this.joined = null;
    return part === null || quantity === 'flow' ? part : { ...part, quantity };
  }

  private refuseReadings(): never {
    const problem = this.readings.problem(this.about.file, true);
    if (problem === null) throw new RangeError('SeriesRecord: readings must have been counted before they are refused');
    throw problem;
  }

  private conflict(day: number, value: number, number: number): IntakeError {
    return new IntakeError({
      ...{ file: this.about.file, row: number, value: String(value) },
      message: `station ${this.about.code} has two unlike values of ${this.about.quantity} for ${isoDate(day)}`,
      remedy: 'Take out the point, or the series, that is wrong',
    });
  }
}

/** Day numbers that have rows. */
function daysWithRows({ firstDay, codes }: Pick<StagedPart, 'firstDay' | 'codes'>): number[] {
  const days: number[] = [];
  for (let at = 0; at < codes.length; at++) if (codes[at] !== NO_ROW) days.push(firstDay + at);
  return days;
}
