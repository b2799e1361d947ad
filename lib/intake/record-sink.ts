import { DayConflict } from './day-conflict.ts';
import { type PageLimits, PageMemory } from './page-memory.ts';
import type { DaySink } from './rows/row-reader.ts';
import { FILLED, OTHER_CODE, OTHER_VALUE, SAME_VALUE, StationDays } from './station-days.ts';

/** Lays the values of a file into one record of days for each station. */
export class RecordSink implements DaySink {
  readonly records: StationDays[] = [];
  filled = 0;
  otherCodes = 0;
  /** days that stood twice with the same to say */
  alike = 0;
  private readonly memory: PageMemory;

  /** @param limits  of the memory that the records share */
  constructor(limits: PageLimits = {}) {
    this.memory = new PageMemory(limits);
  }

  /** @throws DayConflict when the day stands already with another value */
  take(station: number, day: number, value: number, code: number, line: number): void {
    let record = this.records[station];
    if (record === undefined) {
      record = new StationDays(this.memory);
      this.records[station] = record;
    }
    const outcome = record.put(day, value, code);
    if (outcome === OTHER_VALUE) throw new DayConflict(station, day, value, line);
    if (outcome === FILLED) this.filled++;
    else if (outcome === OTHER_CODE) this.otherCodes++;
    else if (outcome === SAME_VALUE) this.alike++;
  }

  /** Ends the use of what the records lie in. */
  close(): void {
    this.memory.close();
  }
}
