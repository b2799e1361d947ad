import { isoDate } from '../calendar/day.ts';
import type { TablePlan } from './recognise/table-plan.ts';
import { RowLoop } from './rows/row-loop.ts';
import type { DaySink, RowReader } from './rows/row-reader.ts';
import { RowsOfDays } from './several-a-day.ts';
import { NO_TIME } from './time-of-day.ts';
import { TimedRows } from './timed-rows.ts';
import { IntakeError } from './types.ts';

/** Two rows give one day of one station unlike values. */
export class DayConflict extends Error {
  override name = 'DayConflict';
  constructor(
    readonly station: number,
    readonly day: number,
    readonly value: number,
    readonly line: number,
  ) {
    super('unlike values for one day');
  }
}

/** Rows behind the conflict that are looked at for how many values a day has. */
const ROWS_BEHIND = 2000;

/** Waits for the first value of one day of one station, and looks on at the times of the rows from there. */
class ConflictSink implements DaySink {
  second = NO_TIME;
  line = -1;
  value = Number.NaN;
  /** times of day of the two rows */
  times: [number, number] = [NO_TIME, NO_TIME];
  readonly rowsOfDays = new RowsOfDays();
  rowsBehind = 0;

  constructor(private readonly wanted: DayConflict) {}

  take(station: number, day: number, value: number, _code: number, line: number): void {
    const { wanted } = this;
    if (station !== wanted.station) return;
    if (this.line < 0 && day === wanted.day && !Number.isNaN(value)) {
      this.line = line;
      this.value = value;
      this.times[0] = this.second;
    }
    if (this.line < 0) return;
    if (line === wanted.line) this.times[1] = this.second;
    if (line > wanted.line) this.rowsBehind++;
    this.rowsOfDays.add(station, day, this.second, value, line);
  }
}

/** Says which two rows contradict one another, or that the file has several values a day when these two say other times
 *  of it. The first row is found by reading the file again: keeping the row of every day would double the memory of every
 *  good file.
 *  @param readerFor  makes a reader like the one that met the conflict, onto another sink */
export async function conflictError(
  path: string,
  plan: TablePlan,
  conflict: DayConflict,
  code: string,
  readerFor: (sink: DaySink) => RowReader,
): Promise<IntakeError> {
  const sink = new ConflictSink(conflict);
  const reader = new TimedRows(plan, readerFor(sink), sink);
  await new RowLoop(plan, reader, { stop: () => sink.rowsBehind >= ROWS_BEHIND }).read(path);
  const [first, second] = sink.times;
  const readings = first !== second ? sink.rowsOfDays.problem(plan.file, true) : null;
  if (readings) return readings;
  return new IntakeError({
    file: plan.file,
    row: conflict.line,
    value: String(conflict.value),
    message: `station ${code} has two unlike values for ${isoDate(conflict.day)}: ${sink.value} in row ${sink.line} and ${conflict.value} in row ${conflict.line}`,
    remedy: 'Take out the row that is wrong; of a file with several values a day, import its daily means',
  });
}
