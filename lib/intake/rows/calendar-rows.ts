import type { CodeTable } from '../code-table.ts';
import { dayOfParts, fullYear, NO_DAY, parseMonth, parseWhole } from '../dates.ts';
import type { CalendarCell, CalendarPlan } from '../recognise/calendar-plan.ts';
import { factsIn, pairOf, withoutSign } from '../recognise/stated-facts.ts';
import type { TablePlan } from '../recognise/table-plan.ts';
import type { StationCodes } from '../station-codes.ts';
import { decodeText } from '../text-encoding.ts';
import { IntakeError } from '../types.ts';
import type { ValueReader } from '../value-reader.ts';
import { parseYearMonth, yearOfHeading } from '../year-month.ts';
import type { Fields } from './fields.ts';
import { FixedWidthLines } from './fixed-width.ts';
import { type DaySink, fieldIs, NO_ROW_OF_DATA, type RowReader, textOf } from './row-reader.ts';
import { UnitColumn } from './unit-column.ts';
import { WhitespaceLines } from './whitespace.ts';

/** First words of lines that sum a month or a year up, in the languages that headings are read in. */
const SUMMARY =
  /^(?:totals?|sum|mean|average|avg|min|minimum|max|maximum|median|count|days|summe|mittel|mittelwert|summen?|total|moyenne|moy|somme|suma|media|maximo|minimo|m[eé]dia|m[aá]ximo|m[ií]nimo|medel|medelv[aä]rde|gemiddelde|som|[mn]*[hn]?[hmn]q)\b/iu;

/** Rows of a month with a column for each day, or of a day with a column for each month. A cell that cannot be read, and a
 *  value on a day that does not exist, rejects the row in the report, by cell; its other values are taken. */
export class CalendarRows implements RowReader {
  /** rows of other quantities, left out */
  leftOut = 0;
  private readonly calendar: CalendarPlan;
  private readonly where: Uint8Array;
  private readonly unit: UnitColumn;
  private readonly fixed: FixedWidthLines | null;
  private year: number | null;
  private station: number;
  private statedStation: string | undefined;

  /** @param onlyStation  the station of a file without a station column */
  constructor(
    private readonly plan: TablePlan & { calendar: CalendarPlan },
    private readonly parts: { stations: StationCodes; codes: CodeTable; values: ValueReader; sink: DaySink },
    onlyStation: number,
  ) {
    this.calendar = plan.calendar;
    this.where = new TextEncoder().encode(plan.mapping.where?.equals ?? '');
    this.unit = new UnitColumn(plan);
    this.fixed = plan.splitter instanceof FixedWidthLines ? plan.splitter : null;
    this.year = plan.calendar.firstYear;
    this.station = onlyStation;
    const stated = plan.facts?.length === 1 ? plan.facts[0] : undefined;
    this.statedStation = stated?.code ?? stated?.name;
  }

  read(bytes: Uint8Array, fields: Fields, line: number): string | null {
    const { plan, calendar, parts } = this;
    const { places } = plan;
    if (fields.unclosed) return 'a quoted field is not closed on its row';
    const place = this.place(bytes, fields);
    if (place === null) return this.between(bytes, fields, line);
    if (fields.count <= calendar.cells[0].value)
      return `the row has ${fields.count} fields: it is cut short or damaged`;
    if (plan.splitter instanceof WhitespaceLines && this.isRagged(fields, place))
      return `the row has ${fields.count} fields set apart by blanks, so which days they are of cannot be told`;
    const surplus = this.surplus(bytes, fields);
    if (surplus !== null) return surplus;
    if (places.where >= 0 && !fieldIs(bytes, fields, places.where, this.where)) {
      this.leftOut++;
      return null;
    }
    if (places.unit >= 0) {
      const problem = this.unit.problem(bytes, fields, line);
      if (problem !== null) return problem;
    }
    if (place.year === null) return 'no line above the row, and no column, says its year';
    let station = this.station;
    if (places.station >= 0) {
      station = parts.stations.ofField(bytes, fields.start[places.station], fields.end[places.station], line);
      if (station < 0) return 'the row names no station';
    }
    return this.cells(bytes, fields, line, { ...place, year: place.year, station });
  }

  comment(text: string): void {
    if (this.calendar.headings) this.turnToYear(withoutSign(text));
  }

  /** @returns false when the text names no year */
  private turnToYear(text: string): boolean {
    const heading = yearOfHeading(text);
    if (heading === null) return false;
    // Of two years that a heading names, the mapping counts from the one it goes by.
    this.year = heading.spans && this.calendar.begins.named === 'last' ? heading.year + 1 : heading.year;
    return true;
  }

  /** Without a delimiter, empty cells leave no trace: only a month that ends with its last day may be shorter. */
  private isRagged(fields: Fields, { year, row }: { year: number | null; row: number }): boolean {
    const { cells } = this.calendar;
    const last = cells[cells.length - 1];
    if (fields.count > Math.max(last.value, last.flag ?? 0)) return false;
    if (this.plan.mapping.layout === 'day-rows' || year === null) return true;
    const days = cells.filter(({ number }) => dayOfParts(year, row, number) > NO_DAY).length;
    return fields.count !== cells[0].value + days * (last.flag === null ? 1 : 2);
  }

  /** Year and month, or year and day, of a row; null when it has none. */
  private place(bytes: Uint8Array, fields: Fields): { year: number | null; row: number } | null {
    const { calendar, plan } = this;
    const { year, row } = calendar;
    if (row >= fields.count || year >= fields.count) return null;
    const monthRows = plan.mapping.layout === 'month-rows';
    const [start, end] = [fields.start[row], fields.end[row]];
    if (monthRows && year < 0 && plan.mapping.date.year === undefined) {
      const both = parseYearMonth(decodeText(bytes, start, Math.min(end, start + 24)));
      return both === null ? null : { year: both.year, row: both.month };
    }
    const number = monthRows ? parseMonth(bytes, start, end) : parseWhole(bytes, start, end);
    if (number < 1 || number > (monthRows ? 12 : 31)) return null;
    if (year < 0) return { year: this.year, row: number };
    const written = this.yearIn(bytes, fields, year);
    return written === null ? null : { year: written, row: number };
  }

  private yearIn(bytes: Uint8Array, fields: Fields, column: number): number | null {
    const [start, end] = [fields.start[column], fields.end[column]];
    const { firstYear } = this.plan.mapping;
    const whole = parseWhole(bytes, start, end);
    if (whole >= 0 && whole < 100 && firstYear !== undefined) return fullYear(whole, firstYear);
    return whole >= 0 ? whole : (yearOfHeading(textOf(bytes, fields, column))?.year ?? null);
  }

  private surplus(bytes: Uint8Array, fields: Fields): string | null {
    for (let at = this.plan.fieldCount; at < fields.count; at++) {
      if (fields.end[at] > fields.start[at])
        return `the row has ${fields.count} fields where others have ${this.plan.fieldCount} (${textOf(bytes, fields, at)})`;
    }
    return null;
  }

  private cells(
    bytes: Uint8Array,
    fields: Fields,
    line: number,
    at: { year: number; row: number; station: number },
  ): string | null {
    const { calendar, parts } = this;
    const bad: string[] = [];
    for (const cell of calendar.cells) {
      const { value } = cell;
      // At fixed characters, cells behind the end of a line are blank like others.
      if (value >= fields.count && !this.fixed) continue;
      const { day, date } = this.dayOf(cell, at);
      if (this.fixed?.cuts(fields, value)) {
        bad.push(
          `“${decodeText(bytes, fields.start[value], fields.end[value])}” on ${date} is cut short by the end of the line`,
        );
        continue;
      }
      if (!parts.values.read(bytes, fields.start[value], fields.end[value])) {
        bad.push(`“${textOf(bytes, fields, value)}” on ${date} is not a flow`);
        continue;
      }
      if (day <= NO_DAY) {
        if (!Number.isNaN(parts.values.value))
          bad.push(`“${textOf(bytes, fields, value)}” stands on ${date}, which is no day of the calendar`);
        continue;
      }
      const hasFlag = cell.flag !== null && (this.fixed !== null || cell.flag < fields.count);
      const [start, end] = hasFlag ? [fields.start[cell.flag as number], fields.end[cell.flag as number]] : [0, 0];
      const code = parts.codes.code(bytes, start, end, parts.values.valueText, line);
      parts.sink.take(at.station, day, parts.values.value, code, line);
    }
    if (bad.length === 0) return null;
    return `${bad.slice(0, 5).join('; ')}${bad.length > 5 ? `; and ${bad.length - 5} more` : ''} (the row's other values were taken)`;
  }

  private dayOf(cell: CalendarCell, at: { year: number; row: number }): { day: number; date: string } {
    const monthRows = this.plan.mapping.layout === 'month-rows';
    const [month, day] = monthRows ? [at.row, cell.number] : [cell.number, at.row];
    const { begins } = this.calendar;
    const turned = begins.month > 1 && this.spansYears();
    const firstYear = turned && begins.named === 'last' ? at.year - 1 : at.year;
    const year = turned && month < begins.month ? firstYear + 1 : firstYear;
    const two = (part: number) => String(part).padStart(2, '0');
    return { day: dayOfParts(year, month, day), date: `${year}-${two(month)}-${two(day)}` };
  }

  /** A month that has its year beside it lies in that very year. */
  private spansYears(): boolean {
    return this.plan.mapping.layout === 'day-rows' || this.calendar.year < 0;
  }

  /** A line that is no row of data: a heading with a year or a station, the header again, a line of totals.
   *  @throws IntakeError when the rows below it are of another station than the file was taken for */
  private between(bytes: Uint8Array, fields: Fields, line: number): string {
    const texts = Array.from({ length: fields.count }, (_, at) => decodeText(bytes, fields.start[at], fields.end[at]));
    const { header, mapping } = this.plan;
    if (header !== null && texts.every((text, at) => text === (header[at] ?? ''))) return NO_ROW_OF_DATA;
    const text = texts.filter((field) => field !== '').join(' ');
    if (/^[\s\p{P}\p{S}]*$/u.test(text)) return NO_ROW_OF_DATA;
    if (SUMMARY.test(text)) return NO_ROW_OF_DATA;
    const named = this.stationNamed(bytes, fields, line);
    const dated = this.calendar.headings && this.turnToYear(text);
    if (dated || named) return NO_ROW_OF_DATA;
    const shown = textOf(bytes, fields, this.calendar.row) || text.slice(0, 60);
    return `“${shown}” is not a ${mapping.layout === 'month-rows' ? 'month' : 'day of the month'}`;
  }

  private stationNamed(bytes: Uint8Array, fields: Fields, line: number): boolean {
    const { mapping, file } = this.plan;
    const pair = pairOf(decodeText(bytes, fields.lineStart, fields.lineEnd), mapping.delimiter ?? null);
    if (pair === null) return false;
    const { code, name } = factsIn([pair]);
    const stated = code ?? name;
    if (stated === undefined) return false;
    if (stated === this.statedStation || (code === undefined && this.knowsName(stated))) return true;
    if (mapping.station.from !== 'lines-above' || code === undefined) {
      throw new IntakeError({
        file,
        row: line,
        value: stated,
        message: 'from this line on the file is of another station',
        remedy: 'Split the file by station, or give it a column that names the station',
        needs: 'station',
      });
    }
    this.statedStation = stated;
    this.station = this.parts.stations.add(code, line);
    return true;
  }

  /** A name beside the number that has named the station already. */
  private knowsName(name: string): boolean {
    const { mapping, facts } = this.plan;
    return mapping.station.from === 'lines-above' || facts?.some((stated) => stated.name === name) === true;
  }
}
