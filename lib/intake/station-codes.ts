import { ByteTable } from './byte-table.ts';
import { decodeText } from './text-encoding.ts';
import { type CodePair, IntakeError, type KnownStation } from './types.ts';

/** More stations than any region has; a column of running numbers would fill the memory. */
const MOST_STATIONS = 20_000;

/** A code without what spreadsheets and typists change: leading zeros, and upper and lower case. */
export function bareCode(code: string): string {
  return code
    .trim()
    .replace(/^0+(?=.)/, '')
    .toLowerCase();
}

/** The stations of one file, numbered in order of appearance, and matched to the registry where there is one. */
export class StationCodes {
  readonly codes: string[] = [];
  private readonly table = new ByteTable();
  /** station of each byte string */
  private readonly stationOf: number[] = [];
  private readonly numbers = new Map<string, number>();
  private readonly byCode = new Map<string, string>();
  private readonly byName = new Map<string, string>();
  /** code by its bare form, empty where several share it */
  private readonly byBare = new Map<string, string>();
  /** codes that are the registry's but for case or leading zeros, in order of appearance */
  private readonly pairs: CodePair[] = [];
  private firstPairLine: number | undefined;

  /** @param matchCodes  such codes are taken for the registry's; else `problem` asks about them
   *  @param lenient     an unknown station is given a number like any other and named among `strangers` */
  constructor(
    private readonly file: string,
    private readonly known: readonly KnownStation[] | null,
    private readonly options: { matchCodes?: boolean; lenient?: boolean } = {},
  ) {
    for (const { code, name } of known ?? []) {
      this.byCode.set(code, code);
      // A name borne by two stations names neither.
      const key = name.trim().toLowerCase();
      this.byName.set(key, this.byName.has(key) ? '' : code);
      const bare = bareCode(code);
      this.byBare.set(bare, this.byBare.has(bare) ? '' : code);
    }
  }

  /** Why each unknown station is none of the registry's, by its number; filled when lenient. */
  readonly strangers = new Map<number, IntakeError>();

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
    const code = this.known === null ? text : this.registered(text, line);
    if (code !== null) return this.number(code, line);
    const problem = this.unknown(text, line);
    if (!this.options.lenient) throw problem;
    const stranger = this.number(text, line);
    this.strangers.set(stranger, problem);
    return stranger;
  }

  private number(code: string, line: number | undefined): number {
    const number = this.numbers.get(code);
    if (number !== undefined) return number;
    if (this.codes.length >= MOST_STATIONS) throw this.tooMany(code, line);
    this.numbers.set(code, this.codes.length);
    return this.codes.push(code) - 1;
  }

  /** The registry's code of a station named by its code or name, or by a code that differs by case or leading zeros. */
  private registered(text: string, line: number | undefined): string | null {
    const named = this.byCode.get(text) ?? this.byName.get(text.toLowerCase());
    if (named) return named;
    const near = this.byBare.get(bareCode(text));
    if (!near) return null;
    if (this.pairs.length === 0) this.firstPairLine = line;
    this.pairs.push({ written: text, registered: near });
    return near;
  }

  /** What must be asked before these stations can be taken: whether codes that differ by case or leading zeros are the
   *  registry's. Null when nothing must. */
  problem(): IntakeError | null {
    const { pairs } = this;
    if (pairs.length === 0 || this.options.matchCodes) return null;
    const named = pairs.slice(0, 5).map(({ written, registered }) => `“${written}” for “${registered}”`);
    const more = pairs.length > 5 ? ` and ${pairs.length - 5} more` : '';
    return new IntakeError({
      file: this.file,
      ...(this.firstPairLine === undefined ? {} : { row: this.firstPairLine }),
      value: pairs[0].written,
      message: `the registry has no such station, but one whose code differs only by case or leading zeros; taken for it, the file would read ${named.join(', ')}${more}`,
      remedy:
        'Say that these codes are the registry’s (--match-codes), or put them right: a spreadsheet may have taken leading zeros away',
      needs: 'codes',
      pairs,
    });
  }

  /** Warnings about codes: those taken for the registry's, and those within the file that may be one station. */
  warnings(): string[] {
    const { pairs } = this;
    const taken = pairs.slice(0, 5).map(({ written, registered }) => `“${written}” as “${registered}”`);
    const more = pairs.length > 5 ? ` and ${pairs.length - 5} more` : '';
    const alike = new Map<string, string[]>();
    for (const code of this.codes) alike.set(bareCode(code), [...(alike.get(bareCode(code)) ?? []), code]);
    const groups = [...alike.values()].filter((codes) => codes.length > 1);
    const shown = groups.slice(0, 5).map((codes) => codes.map((code) => `“${code}”`).join(' and '));
    return [
      ...(taken.length > 0
        ? [`Codes that differ by case or leading zeros were matched: ${taken.join(', ')}${more}.`]
        : []),
      ...(shown.length > 0
        ? [`Codes that differ only by case or leading zeros were taken for different stations: ${shown.join('; ')}.`]
        : []),
    ];
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
    const near = this.known?.find(({ code }) => bareCode(code) === bareCode(text));
    return new IntakeError({
      file: this.file,
      ...(line === undefined ? {} : { row: line }),
      value: text,
      message:
        line === undefined ? 'the file names no station, and its own name is none' : 'the registry has no such station',
      remedy: near
        ? `The registry has several that differ from it by case or leading zeros, such as “${near.code}”: write it in full`
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
