import { median } from '../statistics/quantile.ts';

/** What is taken when no record says anything: the usual start in northern temperate regions. */
const START_WITHOUT_DATA = 4;

/** Start month of the low-flow year for `auto`: the region's wettest month, so that lows fall inside the year.
 *  It is the month with the largest median over stations of (mean flow of the month ÷ mean annual flow); of equal
 *  ones the earliest; April when no station has a figure.
 *  @param regimes  12 ratios a station, January first, NaN for months never seen
 *  @returns        1–12
 *  @throws RangeError when a regime does not have 12 figures */
export function resolveYearStart(regimes: readonly Float64Array[]): number {
  let wettest = START_WITHOUT_DATA;
  let largest = Number.NEGATIVE_INFINITY;
  regimes.forEach(({ length }, i) => {
    if (length !== 12) throw new RangeError(`resolveYearStart: regimes[${i}] must have 12 figures, got ${length}`);
  });
  for (let month = 1; month <= 12; month++) {
    const ratio = median(regimes.map((regime) => regime[month - 1]));
    if (!(ratio > largest)) continue;
    largest = ratio;
    wettest = month;
  }
  return wettest;
}
