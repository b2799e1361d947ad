import { FLAG, FLAG_NAMES } from '../../series/daily-series.ts';
import { flagBits } from '../flags.ts';
import { lastPart } from './monitoring-point.ts';
import { type Attributes, attribute } from './xml-events.ts';

/** Definitions by which this program's own documents say what they carry: the flag as written with its meaning, and the
 *  text that stood in the value's place. They stand in each document's dictionary under these ids. */
export const FLAG_DEFINITION = '#flag-as-written';
export const VALUE_DEFINITION = '#value-as-written';
/** In place of flag names, where a flag means none of them. */
export const NO_FLAGS = 'none';

/** FLAG bits that a sentence speaks of. Of several words, single letters are none of the codes that flags are. */
export function sentenceBits(text: string): number {
  const prose = text.trim().split(/\s+/).length > 2;
  return flagBits(prose ? text.replace(/(?<!\p{L})\p{L}(?!\p{L})/gu, ' ') : text);
}

/** One qualifier of a point or of a whole series, gathered element by element. */
export class Qualifier {
  private readonly title: string;
  private readonly href: string;
  private definition = '';
  private description = '';
  private value = '';
  private isNumber = false;

  constructor(attributes: Attributes) {
    this.title = attribute(attributes, 'title');
    this.href = attribute(attributes, 'href');
  }

  open(name: string, attributes: Attributes): void {
    if (name === 'Category' || name === 'Text') this.definition = attribute(attributes, 'definition');
    if (name === 'Quantity' || name === 'Count' || name === 'QuantityRange') this.isNumber = true;
  }

  close(name: string, text: string): void {
    if (name === 'description') this.description = text.trim();
    else if (name === 'value') this.value = text;
  }

  /** Adds what it says to a point. A number (an offset, an accuracy) is no flag. */
  addTo(point: { flag: string; bits: number; exact?: boolean; valueText?: string }): void {
    if (this.isNumber) return;
    if (this.definition === VALUE_DEFINITION) {
      point.valueText = this.value;
      return;
    }
    if (this.definition === FLAG_DEFINITION) {
      point.flag = this.value;
      point.exact = true;
      point.bits = this.description.split(' ').reduce((bits, word) => {
        // A rejection is a person's mark on a record, not a word of its source.
        const name = FLAG_NAMES.find((one) => one === word && one !== 'rejected');
        return name === undefined ? bits : bits | FLAG[name];
      }, 0);
      return;
    }
    const text = this.value.trim() || this.title || lastPart(this.href);
    if (text === '') return;
    point.flag = point.flag === '' ? text : `${point.flag}; ${text}`;
    point.bits |= sentenceBits(this.title) | sentenceBits(this.description) | sentenceBits(lastPart(this.href));
  }
}
