import type { CodeTable } from './code-table.ts';
import { isMissingText } from './missing-codes.ts';
import { parseDecimal, parseGrouped } from './numbers.ts';
import { decodeText } from './text-encoding.ts';
import type { Mapping } from './types.ts';

const LESS_THAN = 60;

/** Reads one value field: a number, `<` and a number, or a missing code. */
export class ValueReader {
  /** the value last read, NaN when missing */
  value = Number.NaN;
  /** number of the text in the value's place, 0 for none */
  valueText = 0;
  /** negative values met so far */
  negatives = 0;
  private readonly missingTexts: Set<string>;
  private readonly missingNumbers: Set<number>;
  private readonly decimal: number;

  /** @param mapping  says the signs of numbers, and texts that mean "no value" beside the usual ones; numbers among them
   *                  by their value */
  constructor(
    private readonly codes: CodeTable,
    private readonly mapping: Pick<Mapping, 'decimal' | 'missing' | 'thousands'>,
  ) {
    const { decimal, missing } = mapping;
    this.decimal = decimal.charCodeAt(0);
    this.missingTexts = new Set(missing.map((text) => text.trim().toLowerCase()));
    const numbers = missing.map((text) => Number(text.trim() === '' ? Number.NaN : text.replace(',', '.')));
    this.missingNumbers = new Set(numbers.filter(Number.isFinite));
  }

  /** Reads the trimmed field from `start` to `end` into `value` and `valueText`.
   *  @returns false when it is neither a value nor a missing code */
  read(bytes: Uint8Array, start: number, end: number): boolean {
    this.valueText = 0;
    if (start === end) {
      this.value = Number.NaN;
      return true;
    }
    const value = this.number(bytes, start, end);
    if (value >= 0 && this.missingNumbers.size === 0) {
      // A negative zero would be another byte pattern for the same flow.
      this.value = value + 0;
      return true;
    }
    return this.readOther(bytes, start, end, value);
  }

  private number(bytes: Uint8Array, start: number, end: number): number {
    const { thousands, decimal } = this.mapping;
    if (thousands === undefined) return parseDecimal(bytes, start, end, this.decimal);
    return end - start > 64 ? Number.NaN : parseGrouped(decodeText(bytes, start, end), decimal, thousands);
  }

  private readOther(bytes: Uint8Array, start: number, end: number, value: number): boolean {
    if (end - start > 64) return false;
    const text = decodeText(bytes, start, end);
    if (this.missingNumbers.has(value) || this.missingTexts.has(text.toLowerCase()) || isMissingText(text)) {
      this.value = Number.NaN;
      this.valueText = this.codes.valueText(text);
      return true;
    }
    if (!Number.isNaN(value)) {
      if (value < 0) this.negatives++;
      this.value = value;
      return true;
    }
    return bytes[start] === LESS_THAN && this.readBelow(bytes, start, end);
  }

  /** `<0.5`: the limit stands for the value, and the code says so. */
  private readBelow(bytes: Uint8Array, start: number, end: number): boolean {
    let first = start + 1;
    while (first < end && bytes[first] === 32) first++;
    this.value = this.number(bytes, first, end);
    this.valueText = this.codes.valueText('<');
    return this.value >= 0;
  }
}
