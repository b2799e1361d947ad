import { type Attributes, attribute, type ElementHandler } from '../documents/xml-events.ts';
import { IntakeError } from '../types.ts';
import type { CellFormat } from './cell-formats.ts';
import { serialText } from './date-serial.ts';
import { columnNumber, type MergedCells } from './merged-cells.ts';

/** The most that a sheet can have. */
const LAST_ROW = 1_048_576;
const LAST_COLUMN = 16_383;

/** What stands for a formula whose value the workbook does not hold. */
const NO_RESULT = 'formula without a stored value';

export interface SheetContent {
  file: string;
  strings: readonly string[];
  formats: readonly CellFormat[];
  from1904: boolean;
  merged: MergedCells;
  mostRows: number;
  /** takes each row's line, its end included */
  write(line: string): void;
}

/** Turns the elements of a sheet into lines of text: its rows in order, cells parted by tabs, a line also for a row that
 *  holds nothing, so that the numbers of rows and lines agree. */
export class SheetRows implements ElementHandler {
  /** formulas without a stored value, and where the first stands */
  formulas = 0;
  firstFormula = '';
  private readonly content: SheetContent;
  /** number of the last row begun, and of the last line written */
  private row = 0;
  private written = 0;
  private width = 0;
  private cells: string[] = [];
  private blocks: { top: number; left: number; right: number }[] = [];
  private column = -1;
  private type = '';
  private style = 0;
  private value: string | null = null;
  private inline = '';
  private hasFormula = false;
  private aside = 0;
  private inCell = false;

  constructor(content: SheetContent) {
    this.content = content;
  }

  enough(): boolean {
    return this.written >= this.content.mostRows;
  }

  open(name: string, attributes: Attributes): void {
    if (name === 'c') this.beginCell(attributes);
    else if (name === 'row') this.beginRow(attributes);
    else if (name === 'f') this.hasFormula = true;
    else if (name === 'rPh') this.aside++;
  }

  close(name: string, text: string): void {
    if (name === 'v' && this.inCell) this.value = text;
    else if (name === 't' && this.inCell && this.aside === 0) this.inline += text;
    else if (name === 'c') this.endCell();
    else if (name === 'row') this.endRow();
    else if (name === 'rPh') this.aside--;
  }

  private beginRow(attributes: Attributes): void {
    const said = attribute(attributes, 'r');
    const row = said === '' ? this.row + 1 : Number(said);
    if (!(Number.isInteger(row) && row > this.row && row <= LAST_ROW)) {
      throw this.damaged(`row ${said.slice(0, 20)} after row ${this.row}`);
    }
    this.row = row;
    this.column = -1;
    this.cells = [];
    this.blocks = this.content.merged.ofRow(row);
  }

  private beginCell(attributes: Attributes): void {
    const place = attributes.r ?? '';
    const column = place === '' ? this.column + 1 : columnNumber(place.replace(/\d+$/, ''));
    if (!(Number.isInteger(column) && column > this.column && column <= LAST_COLUMN)) {
      throw this.damaged(`cell ${place.slice(0, 20)} in row ${this.row}`);
    }
    this.column = column;
    this.type = attributes.t ?? 'n';
    this.style = Number(attributes.s ?? 0);
    this.value = null;
    this.inline = '';
    this.hasFormula = false;
    this.inCell = true;
  }

  private endCell(): void {
    this.inCell = false;
    const hidden = this.blocks.some(
      ({ top, left, right }) =>
        this.column >= left && this.column <= right && !(this.row === top && this.column === left),
    );
    if (hidden) return;
    const text = this.text();
    if (text === '') return;
    while (this.cells.length < this.column) this.cells.push('');
    this.cells.push(inLine(text));
  }

  private text(): string {
    const { type, value } = this;
    if (type === 'inlineStr') return this.inline;
    if (value === null || (value === '' && type !== 'str')) {
      if (!this.hasFormula) return '';
      if (this.formulas++ === 0) this.firstFormula = `${columnName(this.column)}${this.row}`;
      return NO_RESULT;
    }
    if (type === 's') return this.content.strings[Number(value)] ?? '';
    if (type === 'b') return value.trim() === '1' ? 'TRUE' : 'FALSE';
    if (type === 'str' || type === 'e') return value;
    if (type === 'd') return value.trim();
    return this.numberText(value.trim());
  }

  /** A number by the shortest text that reads back as the same; a date where its format says so. */
  private numberText(value: string): string {
    const number = Number(value);
    if (value === '' || !Number.isFinite(number)) return value;
    const format = this.content.formats[this.style];
    const date = format?.date ? serialText(number, format.date, this.content.from1904) : null;
    if (date !== null) return date;
    const text = String(number);
    return format && format.digits > 0 && /^\d+$/.test(text) ? text.padStart(format.digits, '0') : text;
  }

  private endRow(): void {
    while (this.written < this.row - 1 && !this.enough()) this.line('');
    if (this.enough()) return;
    this.width = Math.max(this.width, this.cells.length);
    // A row whose last cells are empty is as wide as the others.
    const empty = this.cells.length === 0;
    this.line(empty ? '' : this.cells.join('\t') + '\t'.repeat(this.width - this.cells.length));
  }

  private line(text: string): void {
    this.written++;
    this.content.write(`${text}\n`);
  }

  private damaged(value: string): IntakeError {
    return new IntakeError({
      ...{ file: this.content.file, value },
      message: 'the rows or cells of the sheet stand out of order',
      remedy: 'Open the workbook in a spreadsheet program and save it anew',
    });
  }
}

/** A cell's text as a field of a line: quoted where it holds a quote, line ends and tabs as blanks. */
function inLine(text: string): string {
  const line = /[\t\r\n]/.test(text) ? text.replace(/[\t\r\n]+/g, ' ') : text;
  return line.includes('"') ? `"${line.replaceAll('"', '""')}"` : line;
}

/** Letters of a column by its position from 0: 26 → AA. */
function columnName(position: number): string {
  let name = '';
  for (let rest = position + 1; rest > 0; rest = Math.floor((rest - 1) / 26)) {
    name = String.fromCharCode(65 + ((rest - 1) % 26)) + name;
  }
  return name;
}
