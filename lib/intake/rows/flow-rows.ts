import type { CodeTable } from '../code-table.ts';
import { NO_DAY } from '../dates.ts';
import type { TablePlan } from '../recognise/table-plan.ts';
import type { StationCodes } from '../station-codes.ts';
import type { ValueReader } from '../value-reader.ts';
import type { Fields } from './fields.ts';
import { PlainRows } from './plain-rows.ts';
import { countProblem, DayReader, type DaySink, fieldIs, type RowReader, textOf } from './row-reader.ts';
import { UnitColumn } from './unit-column.ts';

/** Rows of one value each: a station (in a column, or one for the whole file), a day, a value and perhaps a flag. */
export class FlowRows implements RowReader {
  /** rows of other quantities, left out */
  leftOut = 0;
  private readonly days: DayReader;
  private readonly where: Uint8Array;
  private readonly unit: UnitColumn;
  private readonly plain: PlainRows | null;

  /** @param onlyStation  the station of a file without a station column */
  constructor(
    private readonly plan: TablePlan,
    private readonly parts: { stations: StationCodes; codes: CodeTable; values: ValueReader; sink: DaySink },
    private readonly onlyStation: number,
  ) {
    this.days = new DayReader(plan);
    this.where = new TextEncoder().encode(plan.mapping.where?.equals ?? '');
    this.unit = new UnitColumn(plan);
    this.plain = PlainRows.for(plan, parts, onlyStation);
  }

  readPlain(bytes: Uint8Array, from: number, limit: number, line: number): number {
    return this.plain === null ? -1 : this.plain.read(bytes, from, limit, line);
  }

  read(bytes: Uint8Array, fields: Fields, line: number): string | null {
    const { plan, parts } = this;
    const { places } = plan;
    if (fields.count !== plan.fieldCount || fields.unclosed) {
      const problem = countProblem(bytes, fields, plan);
      if (problem !== null) return problem;
    }
    const other = places.where >= 0 && !fieldIs(bytes, fields, places.where, this.where);
    // No column of this station holds the quantity.
    if (other || places.value < 0) {
      this.leftOut++;
      return null;
    }
    const day = this.days.day(bytes, fields);
    if (day <= NO_DAY) return this.days.problem(day, bytes, fields);
    if (!parts.values.read(bytes, fields.start[places.value], fields.end[places.value])) {
      return `“${textOf(bytes, fields, places.value)}” is not a flow`;
    }
    if (places.unit >= 0) {
      const problem = this.unit.problem(bytes, fields, line);
      if (problem !== null) return problem;
    }
    let station = this.onlyStation;
    if (places.station >= 0) {
      station = parts.stations.ofField(bytes, fields.start[places.station], fields.end[places.station], line);
      if (station < 0) return 'the row names no station';
    }
    const hasFlag = places.flag >= 0 && places.flag < fields.count;
    const code = hasFlag
      ? parts.codes.code(bytes, fields.start[places.flag], fields.end[places.flag], parts.values.valueText, line)
      : parts.codes.code(bytes, 0, 0, parts.values.valueText, line);
    parts.sink.take(station, day, parts.values.value, code, line);
    return null;
  }
}
