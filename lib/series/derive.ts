import type { DailySeries } from './daily-series.ts';
import { quantityWords } from './quantities.ts';
import type { DerivedRecipe } from './station-history.ts';
import { missingMask } from './usable-flow.ts';

/** One summand of a derived record. */
export interface DerivedTerm {
  /** in the unit that the derived record shall have */
  series: DailySeries;
  factor: number;
  /** the value of so many days before is used */
  lagDays: number;
}

/** A sum smaller than this share of its largest summand is a difference of equal values: rounding in the last digits, and
 *  no flow. */
const NOTHING = 1e-12;

/** The sum of other records, day by day: factor × the term's value of `lagDays` days before.
 *
 *  A day has a value only where every term has one; rejected days count as missing. Its flag bits are those of all the
 *  values that it comes from.
 *  @returns  from the first to the last day with a value; null when there is none
 *  @throws RangeError for no terms, a factor that is not finite or a lag that is not whole
 *  Example: [3, 2, 5] − 1 × [1, 1, 1] of a day before, both from day 0 → from day 1: [1, 4] */
export function derive(terms: readonly DerivedTerm[]): DailySeries | null {
  if (terms.length === 0) throw new RangeError('derive: terms must hold at least one term, got none');
  for (const { factor, lagDays } of terms) {
    if (!Number.isFinite(factor)) throw new RangeError(`derive: factor must be a finite number, got ${factor}`);
    if (!Number.isInteger(lagDays)) throw new RangeError(`derive: lagDays must be a whole number, got ${lagDays}`);
  }
  const firstDay = Math.max(...terms.map(({ series, lagDays }) => series.firstDay + lagDays));
  const end = Math.min(...terms.map(({ series, lagDays }) => series.firstDay + series.values.length + lagDays));
  if (end <= firstDay) return null;
  const sum = new Float64Array(end - firstDay);
  const largest = new Float64Array(sum.length);
  const flags = new Uint8Array(sum.length);
  for (const term of terms) addTerm(term, firstDay, { sum, largest, flags });
  for (let day = 0; day < sum.length; day++) {
    if (Number.isNaN(sum[day])) flags[day] = 0;
    else if (Math.abs(sum[day]) < NOTHING * largest[day]) sum[day] = 0;
  }
  return trimmed({ firstDay, values: sum, flags });
}

const MISSING = missingMask([]);

function addTerm(
  { series: { firstDay: start, values, flags: bits }, factor, lagDays }: DerivedTerm,
  firstDay: number,
  { sum, largest, flags }: { sum: Float64Array; largest: Float64Array; flags: Uint8Array },
): void {
  const offset = firstDay - lagDays - start;
  for (let day = 0; day < sum.length; day++) {
    const at = day + offset;
    const value = (bits[at] & MISSING) === 0 ? factor * values[at] : Number.NaN;
    sum[day] += value;
    largest[day] = Math.max(largest[day], Math.abs(value));
    flags[day] |= bits[at];
  }
}

function trimmed({ firstDay, values, flags }: DailySeries): DailySeries | null {
  let from = 0;
  let to = values.length;
  while (from < to && Number.isNaN(values[from])) from++;
  while (to > from && Number.isNaN(values[to - 1])) to--;
  if (from === to) return null;
  return { firstDay: firstDay + from, values: values.slice(from, to), flags: flags.slice(from, to) };
}

/** A recipe in words, as printed beside what rests on it.
 *  Example: "flow: 1041 + 0.8 × 1043 (2 days before) − 1050" */
export function deriveText({ quantity, terms }: Pick<DerivedRecipe, 'quantity' | 'terms'>): string {
  const words = terms.map(({ code, factor, lagDays }, index) => {
    const sign = factor < 0 ? (index === 0 ? '−' : ' − ') : index === 0 ? '' : ' + ';
    const size = Math.abs(factor) === 1 ? '' : `${Math.abs(factor)} × `;
    return `${sign}${size}${code}${lagText(lagDays)}`;
  });
  return `${quantityWords(quantity)}: ${words.join('')}`;
}

function lagText(lagDays: number): string {
  if (lagDays === 0) return '';
  const days = Math.abs(lagDays);
  return ` (${days} ${days === 1 ? 'day' : 'days'} ${lagDays > 0 ? 'before' : 'after'})`;
}
