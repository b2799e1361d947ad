import { parseGrouped } from '../numbers.ts';

const COMMA = /^[+-]?\d+,\d+$/;
const GROUPED = /^[+-]?\d{1,3}(?:,\d{3})+$/;
const POINT = /\d\.\d/;

/** What the comma is in the numbers of a registry: the decimal sign (where no number has a point), else the sign between
 *  thousands; `open` where every number with a comma may be either ("1,234"). */
export type CommaMeaning = 'decimal' | 'thousands' | 'open';

/** @param places  fields of latitudes and longitudes
 *  @param areas   fields of areas, of which alone a group of three says nothing */
export function commaMeaning(places: readonly string[], areas: readonly string[]): CommaMeaning {
  const texts = [...places, ...areas];
  if (texts.some((text) => POINT.test(text))) return 'thousands';
  const commas = texts.filter((text) => text.includes(','));
  if (commas.length === 0) return 'thousands';
  // No degree is counted in thousands.
  if (places.some((text) => /\d,\d/.test(text)) || commas.some((text) => COMMA.test(text) && !GROUPED.test(text)))
    return 'decimal';
  return commas.some((text) => !GROUPED.test(text)) ? 'thousands' : 'open';
}

/** Null for an empty field, NaN for text that is no number. */
export function parseFigure(text: string, comma: CommaMeaning): number | null {
  if (isNothing(text)) return null;
  const decimal = comma === 'decimal' ? ',' : '.';
  return parseGrouped(text, decimal, decimal === ',' ? '.' : ',');
}

/** What stands in a field of which nobody knows the fact. */
export const isNothing = (text: string): boolean => text === '' || /^(na|n\/a|nan|null|none|-)$/i.test(text);
