import type { TablePlan } from './recognise/table-plan.ts';
import type { Fields } from './rows/fields.ts';
import type { RowReader } from './rows/row-reader.ts';
import { TimeOfDay } from './time-of-day.ts';

/** Says the time of day of each row before its reader takes the row's values. The quick way of a reader, which looks at
 *  no time, is not taken. */
export class TimedRows implements RowReader {
  private readonly times: TimeOfDay;

  /** @param clock  is set to the seconds since midnight of the row being read */
  constructor(
    plan: TablePlan,
    private readonly inner: RowReader,
    private readonly clock: { second: number },
  ) {
    this.times = new TimeOfDay(plan);
  }

  comment(text: string, line: number): void {
    this.inner.comment?.(text, line);
  }

  read(bytes: Uint8Array, fields: Fields, line: number): string | null {
    this.clock.second = this.times.of(bytes, fields);
    return this.inner.read(bytes, fields, line);
  }
}
