import { CodeTable } from './code-table.ts';
import { stationAbove } from './recognise/lines-above.ts';
import type { TablePlan } from './recognise/table-plan.ts';
import { CalendarRows } from './rows/calendar-rows.ts';
import { FlowRows } from './rows/flow-rows.ts';
import type { DaySink, RowReader } from './rows/row-reader.ts';
import { WideRows } from './rows/wide-rows.ts';
import { StationCodes, stationInFileName } from './station-codes.ts';
import type { InspectOptions } from './types.ts';
import { ValueReader } from './value-reader.ts';

/** What reads the rows of one table, built anew for each reading of it. */
export interface TableReading {
  reader: RowReader;
  stations: StationCodes;
  codes: CodeTable;
  values: ValueReader;
  /** rows of other quantities, not read */
  leftOut(): number;
}

/** Stands in for the values of a table of which nobody knows yet where they are. */
class NoValues extends ValueReader {
  override read(): boolean {
    this.value = Number.NaN;
    return true;
  }
}

/** The reader that fits a plan, with the tables of stations and codes that it fills.
 *  @param sink  takes every value
 *  @param look  for a first look: unknown stations are numbered like others, and where nobody knows yet which column holds
 *               the flows, rows are read without
 *  @throws IntakeError, except for a look, when the station of a heading, or of the file's name, is unknown */
export function tableReading(plan: TablePlan, options: InspectOptions, sink: DaySink, look = false): TableReading {
  const stations = new StationCodes(plan.file, options.knownStations ?? null, {
    matchCodes: options.matchCodes,
    lenient: look,
  });
  const codes = new CodeTable(plan.file, plan.iceLetter, plan.mapping.flags);
  const values =
    look && plan.wide === null && plan.mapping.value === null
      ? new NoValues(codes, plan.mapping)
      : new ValueReader(codes, plan.mapping);
  const reading = { stations, codes, values };
  if (plan.wide) {
    const columns = plan.wide.map(({ name }) => stations.add(name, plan.firstLine - 1));
    return { ...reading, reader: new WideRows(plan, { ...reading, sink }, columns), leftOut: () => 0 };
  }
  const { station } = plan.mapping;
  const above = station.from === 'lines-above' ? stationAbove(plan.facts, options.knownStations) : null;
  const name = station.from === 'given' ? station.code : (above ?? stationInFileName(options.fileName));
  const only = plan.places.station < 0 ? stations.add(name) : -1;
  const { calendar } = plan;
  if (calendar) {
    const reader = new CalendarRows({ ...plan, calendar }, { ...reading, sink }, only);
    return { ...reading, reader, leftOut: () => reader.leftOut };
  }
  const reader = new FlowRows(plan, { ...reading, sink }, only);
  return { ...reading, reader, leftOut: () => reader.leftOut };
}
