/** Powers of ten that a double holds exactly. */
export const POWERS_OF_TEN = Float64Array.from({ length: 23 }, (_, exponent) => Number(`1e${exponent}`));

const PLUS = 43;
const MINUS = 45;
const DECIMAL_NUMBER = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/;

/** Reads a decimal number from bytes, to exactly the double that `Number(text)` gives.
 *
 *  Up to 15 significant digits the digits form a whole number that a double holds exactly, and one division by an exact
 *  power of ten rounds correctly. Anything longer, and anything with an exponent, goes through `Number`.
 *  @param decimal  byte that separates the decimals: 46 (`.`) or 44 (`,`)
 *  @returns        NaN when the bytes from `start` to `end` (exclusive, already trimmed) are not one finite decimal
 *                  number; hexadecimal, `Infinity` and thousands separators are none
 *  Example: the bytes of "87.0" → 87 */
export function parseDecimal(bytes: Uint8Array, start: number, end: number, decimal: number): number {
  let at = start;
  const sign = at < end ? bytes[at] : 0;
  if (sign === MINUS || sign === PLUS) at++;
  let whole = 0;
  let significant = 0;
  let digits = 0;
  let decimals = -1;
  for (; at < end; at++) {
    const byte = bytes[at];
    const digit = byte - 48;
    if (digit >= 0 && digit <= 9) {
      whole = whole * 10 + digit;
      digits++;
      if (whole !== 0) significant++;
      if (decimals >= 0) decimals++;
    } else if (byte === decimal && decimals < 0) decimals = 0;
    else return parseSlowly(bytes, start, end, decimal);
  }
  if (digits === 0) return Number.NaN;
  if (significant > 15 || decimals > 22) return parseSlowly(bytes, start, end, decimal);
  const size = decimals > 0 ? whole / POWERS_OF_TEN[decimals] : whole;
  return sign === MINUS ? -size : size;
}

function parseSlowly(bytes: Uint8Array, start: number, end: number, decimal: number): number {
  // No number that means anything is longer; a line of a million digits is not worth a string.
  if (end - start > 400) return Number.NaN;
  let text = '';
  for (let at = start; at < end; at++) text += bytes[at] === decimal ? '.' : String.fromCharCode(bytes[at]);
  if (decimal !== 46 && bytes.subarray(start, end).includes(46)) return Number.NaN;
  const value = DECIMAL_NUMBER.test(text) ? Number(text) : Number.NaN;
  return Number.isFinite(value) ? value : Number.NaN;
}

/** Reads a number whose whole part may be set in groups of three digits: `1,234.5`, `1.234,5`, `1 234,5`, `1'234.5`.
 *  Groups are all or none, and only before the decimal sign; a blank between them may be a fixed or a narrow one.
 *  @param text  the trimmed field
 *  @returns     NaN when it is no such number: 1,23 and 1234,567 are not grouped by three
 *  Example: parseGrouped('1,234.5', '.', ',') → 1234.5 */
export function parseGrouped(text: string, decimal: '.' | ',', thousands: ',' | '.' | ' ' | "'"): number {
  if (text.length > 60) return Number.NaN;
  // The typographer's apostrophe and the spaces that do not break lines are written for the plain ones.
  const plain = text
    .replace(/[\u00a0\u2009\u202f]/g, ' ')
    .replaceAll('’', "'")
    .replace(/^−/, '-');
  const grouped = new RegExp(`^[+-]?\\d{1,3}(?:[${thousands}]\\d{3})+(?:[${decimal}]\\d*)?$`);
  const digits = grouped.test(plain) ? plain.replaceAll(thousands, '') : plain;
  const pointed = decimal === ',' ? digits.replace(',', '.') : digits;
  if (decimal === ',' && digits.includes('.')) return Number.NaN;
  return DECIMAL_NUMBER.test(pointed) ? Number(pointed) : Number.NaN;
}
