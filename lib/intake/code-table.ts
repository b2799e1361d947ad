import { bitsOfFlags } from '../series/daily-series.ts';
import { type DayCode, NO_ROW } from '../series/day-codes.ts';
import { ByteTable } from './byte-table.ts';
import { flagBits } from './flags.ts';
import { decodeText } from './text-encoding.ts';
import { IntakeError, type Mapping } from './types.ts';

/** The day codes of one file: each pair of a flag and a text in the value's place gets one number, 0 to 254. */
export class CodeTable {
  readonly codes: DayCode[] = [];
  private readonly flags = new ByteTable();
  private readonly valueTexts: string[] = [''];
  /** code of each flag with a plain number, −1 while there is none */
  private readonly plain: number[] = [];
  private readonly others = new Map<number, number>();

  /** @param iceLetter  letter that means ice among this file's flags
   *  @param meanings  what flags mean by their text, before what their words say */
  constructor(
    private readonly file: string,
    private readonly iceLetter?: string,
    private readonly meanings: NonNullable<Mapping['flags']> = {},
  ) {}

  /** The bytes of the flag last read by `code`. */
  get lastFlag(): Uint8Array {
    return this.flags.lastKey;
  }

  /** Number of a text that stood in the value's place, for `code`; 0 is none. */
  valueText(text: string): number {
    const known = this.valueTexts.indexOf(text);
    return known >= 0 ? known : this.valueTexts.push(text) - 1;
  }

  /** Code of a row: the flag in the bytes from `start` to `end`, with the numbered value text.
   *  @throws IntakeError when the file has more codes than a byte can tell apart */
  code(bytes: Uint8Array, start: number, end: number, valueText: number, line: number): number {
    const flag = this.flags.intern(bytes, start, end);
    if (valueText === 0) {
      const plain = this.plain[flag];
      return plain === undefined ? this.add(flag, 0, line) : plain;
    }
    return this.others.get(valueText * 4096 + flag) ?? this.add(flag, valueText, line);
  }

  private add(flag: number, valueText: number, line: number): number {
    const flagText = decodeText(this.flags.key(flag)).replaceAll('""', '"');
    const written = this.valueTexts[valueText];
    if (this.codes.length >= NO_ROW) {
      throw new IntakeError({
        file: this.file,
        row: line,
        value: flagText || written,
        message: `the flags hold more than ${NO_ROW} different texts, so this is hardly a column of flags`,
        remedy: 'Say in a mapping which column holds the flags, or {"flag": null}',
        needs: 'mapping',
      });
    }
    const code = this.codes.length;
    const bits = this.bitsOf(flagText, this.iceLetter) | this.bitsOf(written);
    this.codes.push({ text: flagText || written, bits, ...(written === '' ? {} : { valueText: written }) });
    if (valueText === 0) this.plain[flag] = code;
    else this.others.set(valueText * 4096 + flag, code);
    return code;
  }

  private bitsOf(text: string, iceLetter?: string): number {
    if (!Object.hasOwn(this.meanings, text)) return flagBits(text, iceLetter);
    return bitsOfFlags(this.meanings[text]);
  }
}
