import { ByteTable } from './byte-table.ts';
import { decodeText } from './text-encoding.ts';
import { IntakeError, type KnownStation } from './types.ts';

/** More stations than any region has; a column of running numbers would fill the memory. */
const MOST_STATIONS = 20_000;

/** The stations of one file, numbered in order of appearance, and matched to the registry where there is one. */
export class StationCodes {
  readonly codes: string[] = [];
  private readonly table = new ByteTable();
  /** station of each byte string */
  private readonly stationOf: number[] = [];
  private readonly numbers = new Map<string, number>();
  private readonly byCode = new Map<string, string>();
  private readonly byName = new Map<string, string>();

  constructor(
    private readonly file: string,
    private readonly known: readonly KnownStation[] | null,
  ) {
    for (const { code, name } of known ?? []) {
      this.byCode.set(code, code);
      // A name borne by two stations names neither.
      const key = name.trim().toLowerCase();
      this.byName.set(key, this.byName.has(key) ? '' : code);
    }
  }

  /** Number of the station that a field names; −1 for an empty field.
   *  @throws IntakeError when the registry does not know it */
  ofField(bytes: Uint8Array, start: number, end: number, line: number): number {
    const key = this.table.intern(bytes, start, end);
    const station = this.stationOf[key];
    if (station !== undefined) return station;
    const text = decodeText(bytes, start, end).replaceAll('""', '"');
    const found = text === '' ? -1 : this.add(text, line);
    this.stationOf[key] = found;
    return found;
  }

  /** The bytes of the field last read by `ofField`. */
  get lastKey(): Uint8Array {
    return this.table.lastKey;
  }

  /** Number of the station that a text names: by code, then by name.
   *  @param line  row that names it, for the message; undefined when the file's name does */
  add(text: string, line?: number): number {
    const code = this.known === null ? text : (this.byCode.get(text) ?? (this.byName.get(text.toLowerCase()) || null));
    if (code === null) throw this.unknown(text, line);
    const number = this.numbers.get(code);
    if (number !== undefined) return number;
    if (this.codes.length >= MOST_STATIONS) throw this.tooMany(code, line);
    this.numbers.set(code, this.codes.length);
    return this.codes.push(code) - 1;
  }

  private tooMany(code: string, line: number | undefined): IntakeError {
    return new IntakeError({
      file: this.file,
      ...(line === undefined ? {} : { row: line }),
      value: code,
      message: `the file names more than ${MOST_STATIONS} stations, so this is hardly the column of stations`,
      remedy: 'Say in a mapping which column names the station, or split the file',
      needs: 'mapping',
    });
  }

  private unknown(text: string, line: number | undefined): IntakeError {
    const bare = (code: string) => code.replace(/^0+/, '').toLowerCase();
    const near = this.known?.find(({ code }) => bare(code) === bare(text));
    return new IntakeError({
      file: this.file,
      ...(line === undefined ? {} : { row: line }),
      value: text,
      message:
        line === undefined ? 'the file names no station, and its own name is none' : 'the registry has no such station',
      remedy: near
        ? `The registry has “${near.code}”: a spreadsheet may have taken leading zeros away`
        : line === undefined
          ? 'Say which station the flows are of, or name the file after its code'
          : 'Add the station to the registry, or take its rows out of the file',
      needs: 'station',
    });
  }
}

/** A file's name without its folder and extension, by which a file that names no station names its own. */
export function stationInFileName(fileName: string): string {
  const name = fileName.replace(/^.*[\\/]/, '');
  return name.replace(/(?<=.)\.[^.]*$/, '').trim();
}
