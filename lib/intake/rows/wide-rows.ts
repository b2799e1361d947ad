import type { CodeTable } from '../code-table.ts';
import { NO_DAY } from '../dates.ts';
import type { WideColumn } from '../recognise/assign-columns.ts';
import type { TablePlan } from '../recognise/table-plan.ts';
import type { ValueReader } from '../value-reader.ts';
import type { Fields } from './fields.ts';
import { countProblem, DayReader, type DaySink, type RowReader, textOf } from './row-reader.ts';

/** Rows of one day each, with a column for every station. A field that cannot be read rejects the row in the report, by
 *  column; the other stations' values of that day are taken. */
export class WideRows implements RowReader {
  private readonly days: DayReader;
  private readonly columns: readonly WideColumn[];

  /** @param stations  number of each column's station */
  constructor(
    private readonly plan: TablePlan,
    private readonly parts: { codes: CodeTable; values: ValueReader; sink: DaySink },
    private readonly stations: readonly number[],
  ) {
    this.days = new DayReader(plan);
    this.columns = plan.wide ?? [];
  }

  read(bytes: Uint8Array, fields: Fields, line: number): string | null {
    const { columns, parts } = this;
    const problem = countProblem(bytes, fields, this.plan);
    if (problem !== null) return problem;
    const day = this.days.day(bytes, fields);
    if (day <= NO_DAY) return this.days.problem(day, bytes, fields);
    const bad: string[] = [];
    for (let at = 0; at < columns.length; at++) {
      const { value, flag } = columns[at];
      if (value >= fields.count) continue;
      if (!parts.values.read(bytes, fields.start[value], fields.end[value])) {
        bad.push(`“${textOf(bytes, fields, value)}” at ${columns[at].name} is not a flow`);
        continue;
      }
      const hasFlag = flag !== null && flag < fields.count;
      const code = hasFlag
        ? parts.codes.code(bytes, fields.start[flag], fields.end[flag], parts.values.valueText, line)
        : parts.codes.code(bytes, 0, 0, parts.values.valueText, line);
      parts.sink.take(this.stations[at], day, parts.values.value, code, line);
    }
    if (bad.length === 0) return null;
    return `${bad.slice(0, 5).join('; ')}${bad.length > 5 ? `; and ${bad.length - 5} more` : ''} (the row's other values were taken)`;
  }
}
