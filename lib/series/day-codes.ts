/** What a file says of a day beside its number. */
export interface DayCode {
  /** the flag as written; where the row has none, the text that stood in the value's place (`Ice`, `-99.0000`, `<`) */
  text: string;
  /** flag bits, see FLAG */
  bits: number;
  /** text in the value's place (`-999.00`, `Ice`), or before its number (`<`); absent when there was only a number
   *  or nothing */
  valueText?: string;
}

/** Among the codes of a file's days, which are places in its list of codes: the file has no row for this day. */
export const NO_ROW = 255;

/** Flag bits of each day, from the codes of a file's days. */
export function flagsOfCodes(codes: Uint8Array, codeList: readonly DayCode[]): Uint8Array {
  const flags = new Uint8Array(codes.length);
  if (codeList.every(({ bits }) => bits === 0)) return flags;
  const bits = new Uint8Array(256);
  for (const [index, code] of codeList.entries()) bits[index] = code.bits;
  for (let day = 0; day < codes.length; day++) flags[day] = bits[codes[day]];
  return flags;
}

/** Numbers the codes of a record that makes more of them than its file had. */
export class CodeNumbers {
  readonly list: DayCode[] = [];
  private readonly numbers = new Map<string, number>();

  /** Number of a code, 0 to 254.
   *  @param inWords  the code's bits in words, to stand for its text when a byte can hardly tell more texts apart: of bits
   *                  there are fewer */
  of(code: DayCode, inWords: string): number {
    const key = JSON.stringify([code.text, code.bits, code.valueText ?? null]);
    const known = this.numbers.get(key);
    if (known !== undefined) return known;
    const inShort = code.text === '' || (code.text === inWords && code.valueText === undefined);
    if (this.list.length >= NO_ROW - 64 && !inShort) return this.of({ text: inWords, bits: code.bits }, inWords);
    const number = this.list.push(code) - 1;
    this.numbers.set(key, number);
    return number;
  }
}
