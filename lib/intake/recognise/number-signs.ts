import { isMissingText } from '../missing-codes.ts';
import type { Mapping } from '../types.ts';

export interface NumberSigns {
  decimal: Mapping['decimal'];
  thousands?: NonNullable<Mapping['thousands']>;
}

const SIGNED = /^(?:<\s*)?[+-]?/;
const BLANKS = /[ \u00a0\u202f]/;

/** Times that a sign must have been met before three digits, beside as many whole numbers without it, to be thought of as
 *  standing between thousands where it usually is the decimal point. */
const SUSPICIOUS = 5;

/** Which signs set decimals and groups of three digits apart in the values of a file.
 *  @param texts  values as written
 *  @returns      null where "1,234" may be either, and no other value says which */
export function numberSigns(texts: readonly string[]): NumberSigns | null {
  const plain = texts.filter((text) => !isMissingText(text)).map((text) => text.replace(SIGNED, ''));
  const some = (pattern: RegExp) => plain.some((text) => pattern.test(text));
  const blanks = some(/^\d{1,3}(?:[ \u00a0\u202f]\d{3})+(?:[.,]\d+)?$/);
  if (blanks) return { ...decimalOf(plain.map((text) => text.replace(new RegExp(BLANKS, 'g'), ''))), thousands: ' ' };
  const marks = some(/^\d{1,3}(?:['’]\d{3})+(?:[.,]\d+)?$/);
  if (marks) return { ...decimalOf(plain.map((text) => text.replace(/['’]/g, ''))), thousands: "'" };
  if (some(/^\d{1,3}(?:,\d{3})+\.\d+$/) || some(/^\d{1,3}(?:,\d{3}){2,}$/)) return { decimal: '.', thousands: ',' };
  if (some(/^\d{1,3}(?:\.\d{3})+,\d+$/) || some(/^\d{1,3}(?:\.\d{3}){2,}$/)) return { decimal: ',', thousands: '.' };
  const commas = some(/^\d*,\d+$/);
  const points = some(/^\d*\.\d+$/);
  if (commas && points) return ofBothSigns(plain);
  if (commas) return isDecimal(plain, ',') ? { decimal: ',' } : null;
  if (points && !isDecimal(plain, '.') && mayBeGroups(plain)) return null;
  return { decimal: '.' };
}

/** Commas in some values and points in others: the one that always stands before three digits sets thousands apart. */
function ofBothSigns(plain: readonly string[]): NumberSigns {
  const groups = (mark: string, pattern: RegExp) => plain.every((text) => !text.includes(mark) || pattern.test(text));
  if (groups(',', /^[1-9]\d{0,2}(?:,\d{3})+$/)) return { decimal: '.', thousands: ',' };
  return groups('.', /^[1-9]\d{0,2}(?:\.\d{3})+$/) ? { decimal: ',', thousands: '.' } : { decimal: '.' };
}

/** The decimal sign of numbers without groups. */
function decimalOf(plain: readonly string[]): { decimal: '.' | ',' } {
  return { decimal: plain.some((text) => /^\d+,\d+$/.test(text)) ? ',' : '.' };
}

/** True when some value shows that the sign sets decimals apart: not three digits behind it, nothing or a zero before
 *  it, four digits before it, or a whole number of four digits without it. */
function isDecimal(plain: readonly string[], sign: ',' | '.'): boolean {
  const mark = sign === ',' ? ',' : '\\.';
  const shown = new RegExp(`^(?:\\d*${mark}(?:\\d{1,2}|\\d{4,})|0*${mark}\\d+|\\d{4,}${mark}\\d+|[1-9]\\d{3,})$`);
  return plain.some((text) => shown.test(text));
}

/** A point is the usual decimal sign. Where it always stands before three digits, and the other values are whole numbers
 *  below a thousand, it may yet stand between thousands. */
function mayBeGroups(plain: readonly string[]): boolean {
  const grouped = plain.filter((text) => /^[1-9]\d{0,2}\.\d{3}$/.test(text)).length;
  const whole = plain.filter((text) => /^\d{1,3}$/.test(text)).length;
  return grouped >= SUSPICIOUS && whole >= SUSPICIOUS;
}
