import { isMissingText } from '../missing-codes.ts';

const NUMBER = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/;

/** Reads the values of a document: numbers, and what stands for none. */
export class ValueText {
  /** the value last read, NaN when missing */
  value = Number.NaN;
  /** what stood in the value's place; undefined for a plain number or nothing */
  text: string | undefined;
  /** negative values met so far */
  negatives = 0;
  private readonly missingTexts: Set<string>;
  private readonly missingNumbers: number[];

  /** @param missing  texts that mean "no value" beside the usual ones; numbers among them by their value */
  constructor(missing: readonly string[]) {
    this.missingTexts = new Set(missing.map((text) => text.trim().toLowerCase()));
    this.missingNumbers = missing.filter((text) => text.trim() !== '').map(Number);
  }

  /** @param noData  numbers that mean "no value" in this series
   *  @returns false when the text is neither a value nor none */
  read(text: string, noData: readonly number[]): boolean {
    this.text = undefined;
    this.value = Number.NaN;
    if (text === '') return true;
    const value = NUMBER.test(text) ? Number(text) : Number.NaN;
    if (noData.includes(value) || this.missingNumbers.includes(value) || this.missingTexts.has(text.toLowerCase())) {
      this.text = text;
      return true;
    }
    if (isMissingText(text)) {
      this.text = text;
      return true;
    }
    if (!Number.isFinite(value)) return false;
    if (value < 0) this.negatives++;
    // A negative zero would be another byte pattern for the same flow.
    this.value = value + 0;
    return true;
  }
}
