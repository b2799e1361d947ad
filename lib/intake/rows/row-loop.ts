import { readBlocks } from '../file-blocks.ts';
import { agencyColumns, seriesOf } from '../recognise/agency-columns.ts';
import { isWidthRow } from '../recognise/find-header.ts';
import { factsIn, pairOf } from '../recognise/stated-facts.ts';
import type { TablePlan } from '../recognise/table-plan.ts';
import type { Rejections } from '../rejections.ts';
import { decodeText, refuseUnlessUtf8 } from '../text-encoding.ts';
import { IntakeError } from '../types.ts';
import { Fields } from './fields.ts';
import { FixedWidthLines } from './fixed-width.ts';
import { isEmptyRow, NO_ROW_OF_DATA, type RowReader } from './row-reader.ts';

const COMMENT = 35;
/** Bytes of a line between the rows that are looked at. */
const MOST_OF_REMARK = 200;

type QuickReader = Required<RowReader>;

export interface LoopOptions {
  signal?: AbortSignal;
  onBytes?(bytes: Uint8Array): void;
  /** after every block */
  onBlock?(rows: number): void;
  rejections?: Rejections;
  /** asked after every row taken; true ends the reading */
  stop?(): boolean;
}

/** Sends every row of a file through a reader: skips what stands above the data, blank lines and comment lines, and
 *  counts and rejects the rest. */
export class RowLoop {
  /** rows of data met, taken or rejected */
  rows = 0;
  /** line number of the last line read */
  line = 0;
  /** the last line has no line end: the file may have been cut */
  endsOpen = false;
  /** times that the header was met again below the first row of data */
  headersAgain = 0;
  private readonly fields = new Fields(16);
  private started = false;
  private stopped = false;
  /** parameter and statistic of an agency file's column that is read; null: the daily mean discharge */
  private readonly series: string | null;

  constructor(
    private readonly plan: TablePlan,
    private readonly reader: RowReader,
    private readonly options: LoopOptions,
  ) {
    this.series = seriesOf(plan.header?.[plan.places.value] ?? '');
  }

  /** @throws IntakeError of the reader's, and for lines beyond the longest */
  async read(path: string): Promise<void> {
    const { plan } = this;
    // A header met on the way may move the columns; the next reading begins with those of the first again.
    const { fieldCount, leastFields } = plan;
    const places = { ...plan.places, date: [...plan.places.date] };
    try {
      await this.readAll(path);
    } finally {
      plan.places.date.splice(0, places.date.length, ...places.date);
      Object.assign(plan.places, { ...places, date: plan.places.date });
      Object.assign(plan, { fieldCount, leastFields });
    }
  }

  private async readAll(path: string): Promise<void> {
    const { plan, options } = this;
    await readBlocks(path, {
      file: plan.file,
      lineEnd: plan.lineEnd,
      signal: options.signal,
      nextLine: () => this.line + 1,
      onBytes: options.onBytes,
      visit: (bytes, start, end) => {
        const first = this.started || !plan.marked ? start : start + 3;
        this.started = true;
        if (plan.marked) refuseUnlessUtf8(bytes.subarray(first, end), this.line + 1, plan.file);
        const goOn = this.block(bytes, first, end);
        this.endsOpen = bytes[end - 1] !== plan.lineEnd;
        options.onBlock?.(this.rows);
        return goOn;
      },
    });
  }

  /** Reads the whole lines among the first bytes of a file, by the thorough way.
   *  @param wholeFile  the bytes are all of it, so that a last line may lack its end */
  readHead(head: Uint8Array, wholeFile: boolean): void {
    const end = wholeFile ? head.length : head.lastIndexOf(this.plan.lineEnd) + 1;
    this.block(head, this.plan.marked ? 3 : 0, end);
  }

  private block(bytes: Uint8Array, start: number, end: number): boolean {
    const { plan, reader, fields, options } = this;
    const { splitter, firstLine } = plan;
    const quick = reader.readPlain === undefined ? null : (reader as QuickReader);
    let at = start;
    while (at < end) {
      if (quick !== null && this.line + 1 >= firstLine) {
        at = this.plainRows(quick, bytes, at, end);
        if (this.stopped) return false;
        if (at >= end) return true;
      }
      at = splitter.split(bytes, at, end, fields);
      // Set before reading, for a reader that refuses the file.
      const line = ++this.line;
      if (line < firstLine || fields.lineEnd === fields.lineStart) continue;
      if (this.isComment(bytes)) {
        this.remark(bytes, line);
        continue;
      }
      const reason = reader.read(bytes, fields, line);
      if (reason === null || (reason !== NO_ROW_OF_DATA && this.rejects(bytes, reason))) this.rows++;
      if (options.stop?.()) return false;
    }
    return true;
  }

  /** Takes rows the quick way up to one that must be split. On its own, for readers of one kind only come here: shared
   *  with the others, it takes a third longer.
   *  @returns first byte of that row, or the end */
  private plainRows(reader: QuickReader, bytes: Uint8Array, from: number, end: number): number {
    const { stop } = this.options;
    const first = this.line;
    let at = from;
    let line = first;
    while (at < end) {
      // Set before reading, for a reader that refuses the file.
      this.line = line + 1;
      const next = reader.readPlain(bytes, at, end, line + 1);
      if (next <= 0) break;
      at = next;
      line++;
      if (stop?.()) {
        this.stopped = true;
        break;
      }
    }
    this.rows += line - first;
    this.line = line;
    return at;
  }

  private isComment(bytes: Uint8Array): boolean {
    const { lineStart } = this.fields;
    if (bytes[lineStart] === COMMENT) return true;
    const { comment } = this.plan;
    return comment?.every((byte, at) => bytes[lineStart + at] === byte) === true;
  }

  private remark(bytes: Uint8Array, line: number): void {
    const { fields, reader } = this;
    const text = decodeText(bytes, fields.lineStart, Math.min(fields.lineEnd, fields.lineStart + MOST_OF_REMARK));
    reader.comment?.(text, line);
    this.refuseOtherStation(text, line);
  }

  /** A line between the rows may be the head of another station's.
   *  @throws IntakeError when it is, and the rows have no column that would say so themselves */
  private refuseOtherStation(text: string, line: number): void {
    const { plan } = this;
    const { codesAbove = [], places, wide } = plan;
    if (codesAbove.length === 0 || places.station >= 0 || wide !== null) return;
    const pair = pairOf(text, plan.mapping.delimiter ?? null);
    const code = pair === null ? undefined : factsIn([pair]).code;
    if (code === undefined || codesAbove.includes(code)) return;
    throw new IntakeError({
      file: plan.file,
      row: line,
      value: code,
      message: `from this line on the file is of another station than ${codesAbove[0]}`,
      remedy: 'Split the file by station, or give it a column that names the station',
      needs: 'station',
    });
  }

  /** Rejects the row just split, unless it is no row at all.
   *  @returns whether it counts as a row */
  private rejects(bytes: Uint8Array, reason: string): boolean {
    const { fields, plan } = this;
    if (isEmptyRow(fields)) return false;
    if (plan.repeatsHeader ? this.isHeading(bytes) : this.isHeaderAgain(bytes)) return false;
    const start = fields.lineStart;
    this.refuseOtherStation(decodeText(bytes, start, Math.min(fields.lineEnd, start + MOST_OF_REMARK)), this.line);
    this.options.rejections?.add(bytes, fields.lineStart, fields.lineEnd, this.line, reason);
    return true;
  }

  /** Tables that were put one below another have their header in between.
   *  @throws IntakeError when it is another header: the columns would no longer be where they were */
  private isHeaderAgain(bytes: Uint8Array): boolean {
    const { fields, plan } = this;
    const { header, places } = plan;
    const date = places.date[0];
    if (header === null || date === undefined || date >= fields.count) return false;
    const texts = this.texts(bytes);
    if (texts.length === header.length && texts.every((text, at) => text === header[at])) {
      this.headersAgain++;
      return true;
    }
    const words = texts.filter((text) => /^\p{L}/u.test(text)).length;
    const isHeader = texts.length > 1 && texts.includes(header[date]) && words === texts.length;
    if (!isHeader || plan.splitter instanceof FixedWidthLines) return false;
    throw new IntakeError({
      file: plan.file,
      row: this.line,
      value: texts.join(', ').slice(0, 200),
      message: `from this header on, the columns are others than those of the first header (${header.join(', ').slice(0, 200)})`,
      remedy: 'Split the file where its header changes',
    });
  }

  private texts(bytes: Uint8Array): string[] {
    const { fields } = this;
    return Array.from({ length: fields.count }, (_, at) => decodeText(bytes, fields.start[at], fields.end[at]));
  }

  /** An agency file gives each station a header and a row of widths of its own, with its own series numbers. */
  private isHeading(bytes: Uint8Array): boolean {
    const { plan } = this;
    const texts = this.texts(bytes);
    if (isWidthRow(texts)) return true;
    if (texts[0] !== plan.header?.[0]) return false;
    const columns = agencyColumns(texts, this.series);
    if (columns === null) return false;
    const isFlow = (plan.mapping.quantity ?? 'flow') === 'flow';
    // A station may lack a further quantity; its rows are then left out.
    if (columns.value < 0 && isFlow) {
      throw new IntakeError({
        file: plan.file,
        row: this.line,
        value: texts.join(' ').slice(0, 200),
        message: 'from this header on, no single column holds daily mean discharge',
        remedy: 'Split the file by station, and give a mapping for this part',
        needs: 'mapping',
      });
    }
    Object.assign(plan.places, {
      ...{ date: plan.places.date, station: columns.station, value: columns.value, flag: columns.flag },
    });
    plan.places.date[0] = columns.date;
    plan.fieldCount = texts.length;
    plan.leastFields = Math.min(plan.leastFields, texts.length);
    return true;
  }
}
