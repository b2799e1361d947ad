import { readBlocks } from '../file-blocks.ts';
import { agencyColumns } from '../recognise/agency-columns.ts';
import { isWidthRow } from '../recognise/find-header.ts';
import type { TablePlan } from '../recognise/table-plan.ts';
import type { Rejections } from '../rejections.ts';
import { decodeText, refuseUnlessUtf8 } from '../text-encoding.ts';
import { IntakeError } from '../types.ts';
import { Fields } from './fields.ts';
import { isEmptyRow, type RowReader } from './row-reader.ts';

const COMMENT = 35;

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
  private readonly fields = new Fields(16);
  private started = false;

  constructor(
    private readonly plan: TablePlan,
    private readonly reader: RowReader,
    private readonly options: LoopOptions,
  ) {}

  /** @throws IntakeError of the reader's, and for lines beyond the longest */
  async read(path: string): Promise<void> {
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

  private block(bytes: Uint8Array, start: number, end: number): boolean {
    const { plan, reader, fields, options } = this;
    const { splitter, firstLine } = plan;
    let rows = this.rows;
    let line = this.line;
    let at = start;
    const quick = reader.readPlain !== undefined;
    while (at < end) {
      if (quick && line + 1 >= firstLine) {
        this.line = line + 1;
        const next = (reader as QuickReader).readPlain(bytes, at, end, line + 1);
        if (next > 0) {
          at = next;
          line++;
          rows++;
          if (options.stop?.()) return false;
          continue;
        }
      }
      at = splitter.split(bytes, at, end, fields);
      line++;
      if (line < firstLine || fields.lineEnd === fields.lineStart || bytes[fields.lineStart] === COMMENT) continue;
      // Set before reading, for a reader that refuses the file.
      this.line = line;
      const reason = reader.read(bytes, fields, line);
      if (reason === null) rows++;
      else if (this.rejects(bytes, reason)) rows++;
      if (options.stop?.()) return false;
    }
    this.rows = rows;
    this.line = line;
    return true;
  }

  /** Rejects the row just split, unless it is no row at all.
   *  @returns whether it counts as a row */
  private rejects(bytes: Uint8Array, reason: string): boolean {
    const { fields, plan } = this;
    if (isEmptyRow(fields) || (plan.repeatsHeader && this.isHeading(bytes))) return false;
    this.options.rejections?.add(bytes, fields.lineStart, fields.lineEnd, this.line, reason);
    return true;
  }

  /** An agency file gives each station a header and a row of widths of its own, with its own series numbers. */
  private isHeading(bytes: Uint8Array): boolean {
    const { fields, plan } = this;
    const texts = Array.from({ length: fields.count }, (_, at) => decodeText(bytes, fields.start[at], fields.end[at]));
    if (isWidthRow(texts)) return true;
    if (texts[0] !== plan.header?.[0]) return false;
    const columns = agencyColumns(texts);
    if (columns === null) return false;
    if (columns.value < 0) {
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
