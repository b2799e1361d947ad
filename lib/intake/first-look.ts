import { isoDate } from '../calendar/day.ts';
import { spacingProblem, sparseSpacing } from './day-spacing.ts';
import type { FileHead } from './file-blocks.ts';
import { nothingTaken } from './reading-warnings.ts';
import type { TablePlan } from './recognise/table-plan.ts';
import { Rejections } from './rejections.ts';
import { RowLoop } from './rows/row-loop.ts';
import type { DaySink } from './rows/row-reader.ts';
import { RowsOfDays } from './several-a-day.ts';
import { type TableReading, tableReading } from './table-reading.ts';
import { NO_TIME } from './time-of-day.ts';
import { TimedRows } from './timed-rows.ts';
import { type InspectOptions, IntakeError, type UnderstoodRow } from './types.ts';

/** Rows that are shown as understood, and the most values of one: those of a month. */
const SHOWN_ROWS = 40;
const SHOWN_OF_A_ROW = 31;
/** Values that are looked at for what must be asked: enough to tell, and few enough to answer at every keystroke. */
const MOST_VALUES = 10_000;

/** What the first rows of a table come to, read by the very readers that will read all of it. */
export interface FirstLook {
  understood: UnderstoodRow[];
  /** what their stations and days ask of a person */
  problems: IntakeError[];
  /** codes of the stations met */
  codes: readonly string[];
}

/** Keeps the first values as they are understood, and counts how the others lie. */
class LookSink implements DaySink {
  second = NO_TIME;
  values = 0;
  readonly rows: (Omit<UnderstoodRow, 'station' | 'flag' | 'bits'> & { station: number; code: number })[] = [];
  readonly rowsOfDays = new RowsOfDays();
  /** days with a value, by station */
  readonly days = new Map<number, number[]>();

  take(station: number, day: number, value: number, code: number, line: number): void {
    this.values++;
    this.rowsOfDays.add(station, day, this.second, value, line);
    if (!Number.isNaN(value)) {
      const days = this.days.get(station);
      if (days === undefined) this.days.set(station, [day]);
      else days.push(day);
    }
    if (!this.hasRoom(line)) return;
    const shown = Number.isNaN(value) ? null : value;
    this.rows.push({ row: line, station, date: isoDate(day), value: shown, code, problem: null });
  }

  reject(row: number, problem: string): void {
    if (this.hasRoom(row)) this.rows.push({ row, station: -1, date: null, value: null, code: -1, problem });
  }

  /** values shown, by row */
  private readonly shown = new Map<number, number>();

  private hasRoom(row: number): boolean {
    const values = this.shown.get(row) ?? 0;
    if (values >= SHOWN_OF_A_ROW || (values === 0 && this.shown.size >= SHOWN_ROWS)) return false;
    this.shown.set(row, values + 1);
    return true;
  }
}

/** Reads the first rows of a table. Nothing is thrown for what they hold: it stands in `problem` of the row, or among the
 *  problems.
 *  @param head       of the file; about 10,000 values of it are read
 *  @param orderOpen  nobody knows yet whether day or month comes first: a date that depends on it is null */
export function firstLook(plan: TablePlan, head: FileHead, options: InspectOptions, orderOpen = false): FirstLook {
  if (plan.places.date.length === 0) return { understood: [], problems: [], codes: [] };
  if (!orderOpen) return look(plan, head, options);
  const [first, second] = (['dmy', 'mdy'] as const).map((order) => {
    const { mapping } = plan;
    return look({ ...plan, mapping: { ...mapping, date: { ...mapping.date, order } } }, head, options);
  });
  return { ...first, understood: eitherWay(first.understood, second.understood) };
}

function look(given: TablePlan, head: FileHead, options: InspectOptions): FirstLook {
  // Headers met on the way may move the columns. Where nobody knows the column of the flows, no field is read for one.
  const { date, value } = given.places;
  const places = { ...given.places, date: [...date], value: isOpen(given) ? date[0] : value };
  const plan = { ...given, places };
  const sink = new LookSink();
  const reading = tableReading(plan, options, sink, true);
  const rejections = new Rejections((row) => sink.reject(row.row, row.reason));
  const loop = new RowLoop(plan, new TimedRows(plan, reading.reader, sink), {
    rejections,
    stop: () => sink.values + rejections.total >= MOST_VALUES,
  });
  const problems: IntakeError[] = [];
  try {
    loop.readHead(head.bytes, head.bytes.length >= head.size);
  } catch (error) {
    if (!(error instanceof IntakeError)) throw error;
    problems.push(error);
  }
  const { stations } = reading;
  // Where the date is not known, or all is to be asked, a row cannot be read yet.
  if (sink.values === 0 && rejections.total > 0 && plan.problems.length === 0)
    problems.push(nothingTaken(plan.file, rejections.total, rejections));
  problems.push(...[...stations.strangers.values()].slice(0, 1));
  const asked = stations.problem();
  if (asked) problems.push(asked);
  const whole = head.bytes.length >= head.size && sink.values + rejections.total < MOST_VALUES;
  problems.push(...dayProblems(plan, sink, stations.codes, whole));
  return { understood: sink.rows.map((row) => understoodRow(row, plan, reading)), problems, codes: stations.codes };
}

/** Nobody knows yet which column holds the flows. */
const isOpen = (plan: TablePlan): boolean => plan.wide === null && plan.mapping.value === null;

/** Whether several values a day, or one a month, ask for an answer. A record that begins with one value a month may go on
 *  by day, so only a whole file is judged by it. */
function dayProblems(plan: TablePlan, sink: LookSink, codes: readonly string[], whole: boolean): IntakeError[] {
  const several = plan.mapping.dailyMean === undefined ? sink.rowsOfDays.problem(plan.file) : null;
  if (several) return [several];
  if (!whole) return [];
  for (const [station, days] of sink.days) {
    const spacing = sparseSpacing([...new Set(days)].sort((a, b) => a - b));
    if (spacing !== null) return [spacingProblem(plan.file, codes[station], spacing)];
  }
  return [];
}

function understoodRow(
  row: LookSink['rows'][number],
  plan: TablePlan,
  { stations, codes }: TableReading,
): UnderstoodRow {
  const { row: line, date, value } = row;
  const only = plan.places.station < 0 && plan.wide === null ? stations.codes[0] : undefined;
  const code = codes.codes[row.code];
  const stranger = stations.strangers.get(row.station)?.problem.message ?? null;
  const noValue =
    plan.wide === null && plan.mapping.value === null ? 'which column holds the flows is not known' : null;
  return {
    ...{ row: line, station: stations.codes[row.station] ?? only ?? '', date, value },
    ...{ flag: code?.text ?? '', bits: code?.bits ?? 0, problem: row.problem ?? noValue ?? stranger },
  };
}

/** Rows read day first and month first: what is the same both ways, or can be read only one way, is known. */
function eitherWay(dayFirst: UnderstoodRow[], monthFirst: UnderstoodRow[]): UnderstoodRow[] {
  const byRow = (rows: UnderstoodRow[], row: number) => rows.filter((other) => other.row === row);
  const numbers = [...new Set([...dayFirst, ...monthFirst].map(({ row }) => row))].sort((a, b) => a - b);
  return numbers.flatMap((row) => {
    const [first, second] = [byRow(dayFirst, row), byRow(monthFirst, row)];
    if (first.every(({ date }) => date === null)) return second;
    if (second.every(({ date }) => date === null)) return first;
    return first.map((one, at) =>
      one.date === second[at]?.date
        ? one
        : { ...one, date: null, problem: 'its date can be read day first or month first' },
    );
  });
}
