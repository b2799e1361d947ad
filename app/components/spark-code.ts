/** Annual minima in one character a year, for figures of thirty pixels' height: 2,000 records of 60 years travel in
 *  120 kB instead of 1 MB. Ratios of 0 to 2 in 88 steps; what lies above is known as such; a missing year is a space. */

const STEPS = 88;
/** printable ASCII from '#': no quote, no space */
const FIRST_CODE = 35;
const BACKSLASH = 92;
const TOP = 2;
const ABOVE = '!';
const MISSING = ' ';

/** @param mean the ratio's base, in the minima's unit; a mean that is 0 or missing gives all-zero or no marks */
export function encodeRatios(years: ArrayLike<number>, minima: ArrayLike<number>, mean: number): string {
  if (years.length === 0) return '';
  const out = new Array<string>(years[years.length - 1] - years[0] + 1).fill(MISSING);
  for (let i = 0; i < years.length; i++) out[years[i] - years[0]] = encode(mean === 0 ? 0 : minima[i] / mean);
  return out.join('');
}

function encode(ratio: number): string {
  if (!(ratio >= 0)) return MISSING;
  if (ratio > TOP) return ABOVE;
  const code = FIRST_CODE + Math.round((ratio / TOP) * STEPS);
  return String.fromCharCode(code >= BACKSLASH ? code + 1 : code);
}

/** The ratios of consecutive years: NaN where missing, Infinity where above the top. */
export function decodeRatios(text: string): Float64Array {
  const out = new Float64Array(text.length);
  for (let i = 0; i < text.length; i++) {
    const code = text.charCodeAt(i);
    if (text[i] === MISSING) out[i] = Number.NaN;
    else if (text[i] === ABOVE) out[i] = Number.POSITIVE_INFINITY;
    else out[i] = (((code > BACKSLASH ? code - 1 : code) - FIRST_CODE) / STEPS) * TOP;
  }
  return out;
}
