import { isoDate } from '../calendar/day.ts';
import type { TablePlan } from './recognise/table-plan.ts';
import { RowLoop } from './rows/row-loop.ts';
import type { DaySink, RowReader } from './rows/row-reader.ts';
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

/** Waits for the first value of one day of one station. */
class FirstRowSink implements DaySink {
  line = -1;
  value = Number.NaN;
  constructor(private readonly wanted: DayConflict) {}

  take(station: number, day: number, value: number, _code: number, line: number): void {
    if (this.line >= 0 || station !== this.wanted.station || day !== this.wanted.day || Number.isNaN(value)) return;
    this.line = line;
    this.value = value;
  }
}

/** Says which two rows contradict one another. The first is found by reading the file again: keeping the row of every
 *  day would double the memory of every good file.
 *  @param readerFor  makes a reader like the one that met the conflict, onto another sink */
export async function conflictError(
  path: string,
  plan: TablePlan,
  conflict: DayConflict,
  code: string,
  readerFor: (sink: DaySink) => RowReader,
): Promise<IntakeError> {
  const sink = new FirstRowSink(conflict);
  await new RowLoop(plan, readerFor(sink), { stop: () => sink.line >= 0 }).read(path);
  return new IntakeError({
    file: plan.file,
    row: conflict.line,
    value: String(conflict.value),
    message: `station ${code} has two unlike values for ${isoDate(conflict.day)}: ${sink.value} in row ${sink.line} and ${conflict.value} in row ${conflict.line}`,
    remedy: 'Take out the row that is wrong; of a file with several values a day, import its daily means',
  });
}
