import { bitsOfFlags } from '../../series/daily-series.ts';
import { type DayCode, NO_ROW } from '../../series/day-codes.ts';
import { flagBits } from '../flags.ts';
import { IntakeError, type Mapping } from '../types.ts';

/** Longest text of a qualifier that is kept. */
const KEPT_TEXT = 200;

/** What a document says of a point beside its number. */
export interface PointCode {
  /** the qualifier as written; empty for none */
  flag: string;
  /** FLAG bits that the document says in other words than the qualifier's own */
  bits: number;
  /** where the document says all bits itself: the words of the qualifier add none */
  exact?: boolean;
  /** what stood in the value's place; absent for a plain number or nothing */
  valueText?: string;
}

/** The day codes of one record of a document: qualifier, bits and the text in the value's place. */
export class DayCodes {
  readonly codes: DayCode[] = [];
  private readonly numbers = new Map<string, number>();

  constructor(
    private readonly file: string,
    private readonly meanings: NonNullable<Mapping['flags']> = {},
  ) {}

  /** Number of a point's code, 0 to 254.
   *  @throws IntakeError when the record has more codes than a byte can tell apart */
  number(point: PointCode): number {
    const key = `${point.bits}${point.exact ? '!' : ''}\u0000${point.flag}\u0000${point.valueText ?? '\u0001'}`;
    const known = this.numbers.get(key);
    if (known !== undefined) return known;
    const number = this.codes.length;
    if (number >= NO_ROW) {
      throw new IntakeError({
        file: this.file,
        value: point.flag.slice(0, KEPT_TEXT),
        message: `a series has more than ${NO_ROW} different qualifiers`,
        remedy: 'Leave the qualifiers out: {"flag": null} in a mapping',
        needs: 'mapping',
      });
    }
    this.codes.push(this.dayCode(point));
    this.numbers.set(key, number);
    return number;
  }

  /** The code of a point. */
  of(point: PointCode): DayCode {
    return this.codes[this.number(point)];
  }

  private dayCode({ flag, bits, exact, valueText }: PointCode): DayCode {
    const text = flag.slice(0, KEPT_TEXT);
    const said = Object.hasOwn(this.meanings, text) ? this.meanings[text] : undefined;
    const words = exact ? 0 : flagBits(text) | flagBits(valueText ?? '');
    const all = said ? bitsOfFlags(said) : bits | words;
    return { text: text || (valueText ?? ''), bits: all, ...(valueText === undefined ? {} : { valueText }) };
  }

  /** Learns, after the points, what qualifiers mean: documents of some services explain them at their end.
   *  @param meaning  FLAG bits by qualifier; of qualifiers together, each word counts */
  explain(meaning: ReadonlyMap<string, number>): void {
    for (const code of this.codes) {
      if (Object.hasOwn(this.meanings, code.text)) continue;
      for (const word of [code.text, ...code.text.split(/[\s,]+/)]) code.bits |= meaning.get(word) ?? 0;
    }
  }
}
