import type { AnnualIndexName } from '../basis.ts';
import type { AnnualMinima } from '../lowflow/annual-minima-types.ts';
import { datesOnALine } from '../lowflow/minimum-dates.ts';
import { MEAN_DIGITS, roundSignificant } from '../series/round-significant.ts';

/** The usable years of a station inside a period, and what was seen in them. All arrays run alongside `years`. */
export interface UsedYears {
  /** low-flow years, rising */
  years: number[];
  /** m³/s */
  minima: number[];
  /** day number of each minimum */
  days: number[];
  /** days with zero flow in the year; NaN when unknown */
  zeroDays: number[];
  /** the annual index that is compared, in its own unit and sign */
  values: number[];
  /** how many of the minima are zero */
  zeroMinima: number;
  /** how many of the values are zero */
  zeroValues: number;
}

/** One figure a year of `annual`: NaN where the year has none. Dates are day numbers here.
 *  @param fromRecord  figures of an index that the minima do not bring along, one a year of `annual`
 *  @throws RangeError for such an index without figures, or with too few of them */
export function annualFigures(
  annual: AnnualMinima,
  index: AnnualIndexName,
  fromRecord: Float64Array | null,
): ArrayLike<number> {
  switch (index) {
    case 'minimum':
      return annual.minimum;
    case 'minimum-date':
      return annual.day;
    case 'mean-flow':
      return annual.meanFlow;
    case 'zero-flow-days':
      return annual.zeroDays;
    default:
      if (fromRecord?.length === annual.years.length) return fromRecord;
      throw new RangeError(
        `annualFigures: fromRecord must hold the ${index} of ${annual.years.length} years, got ${fromRecord?.length ?? 'none'}`,
      );
  }
}

/** Picks the usable years of [first, last], both ends included; all usable years when the period is null. Years without
 *  a figure of the index are left out like those that are not usable.
 *  @param fromRecord  see annualFigures */
export function usedYears(
  annual: AnnualMinima,
  period: readonly [number, number] | null,
  index: AnnualIndexName = 'minimum',
  fromRecord: Float64Array | null = null,
): UsedYears {
  const figures = annualFigures(annual, index, fromRecord);
  const used: UsedYears = { years: [], minima: [], days: [], zeroDays: [], values: [], zeroMinima: 0, zeroValues: 0 };
  for (let i = 0; i < annual.years.length; i++) {
    const year = annual.years[i];
    if (annual.usable[i] !== 1 || (period !== null && (year < period[0] || year > period[1]))) continue;
    if (Number.isNaN(figures[i])) continue;
    used.years.push(year);
    used.minima.push(annual.minimum[i]);
    used.days.push(annual.day[i]);
    used.zeroDays.push(annual.zeroDays[i]);
    used.values.push(figures[i]);
    if (annual.minimum[i] === 0) used.zeroMinima++;
    if (figures[i] === 0) used.zeroValues++;
  }
  if (index === 'minimum-date') used.values = datesOnALine(used.days).values;
  // equal years whose days were summed in another order stay equal; minima are rounded already
  if (index === 'mean-flow') used.values = used.values.map((value) => roundSignificant(value, MEAN_DIGITS));
  return used;
}

/** What decides who is complete: years, which of them have a figure, and the figures whose zeros count. */
export type JudgedYears = Pick<AnnualMinima, 'years' | 'usable' | 'minimum'>;

/** The years of a station as its completeness is judged under an index; the minima's own for the minimum. */
export function judgedYears(
  annual: AnnualMinima,
  index: AnnualIndexName,
  fromRecord: Float64Array | null,
): JudgedYears {
  if (index === 'minimum') return annual;
  const figures = annualFigures(annual, index, fromRecord);
  return {
    years: annual.years,
    usable: annual.usable.map((usable, i) => (usable === 1 && !Number.isNaN(figures[i]) ? 1 : 0)),
    minimum: Float64Array.from(figures),
  };
}
