import type { AnnualMinima } from '../lowflow/annual-minima-types.ts';

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
  /** how many of the minima are zero */
  zeroMinima: number;
}

/** Picks the usable years of [first, last], both ends included; all usable years when the period is null. */
export function usedYears(annual: AnnualMinima, period: readonly [number, number] | null): UsedYears {
  const used: UsedYears = { years: [], minima: [], days: [], zeroDays: [], zeroMinima: 0 };
  for (let i = 0; i < annual.years.length; i++) {
    const year = annual.years[i];
    if (annual.usable[i] !== 1 || (period !== null && (year < period[0] || year > period[1]))) continue;
    used.years.push(year);
    used.minima.push(annual.minimum[i]);
    used.days.push(annual.day[i]);
    used.zeroDays.push(annual.zeroDays[i]);
    if (annual.minimum[i] === 0) used.zeroMinima++;
  }
  return used;
}
