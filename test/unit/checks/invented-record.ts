import { dayNumber } from '../../../lib/calendar/day.ts';
import type { DailySeries } from '../../../lib/series/daily-series.ts';
import { seeded } from '../../seeded.ts';

export interface RecordKind {
  years?: number;
  firstYear?: number;
  /** share of the storage that runs off in a day: 0.02 is a river of springs, 0.3 a flashy one */
  recession?: number;
  /** sizes of the years differ by this, as a standard deviation of logarithms */
  betweenYears?: number;
}

/** An invented river: rain on some days fills a storage that empties by a share a day; wet winters, years of unlike size.
 *  Flows of about 1 m³/s, written to four figures. The same seed makes the same record. */
export function inventedRecord(
  seed: number,
  { years = 60, firstYear = 1961, recession = 0.06, betweenYears = 0.25 }: RecordKind = {},
): DailySeries {
  const draw = seeded(seed);
  const normal = () => Math.sqrt(-2 * Math.log(1 - draw())) * Math.cos(2 * Math.PI * draw());
  const firstDay = dayNumber(firstYear, 1, 1);
  const days = dayNumber(firstYear + years, 1, 1) - firstDay;
  const values = new Float64Array(days);
  let storage = 1 / recession;
  let size = 1;
  for (let day = 0; day < days; day++) {
    if (day % 365 === 0) size = Math.exp(betweenYears * normal());
    const season = 1 + 0.7 * Math.cos((2 * Math.PI * (day - 20)) / 365.25);
    if (draw() < 0.3) storage += -Math.log(1 - draw()) * 3 * season * size;
    const flow = storage * recession;
    storage -= flow;
    values[day] = Number((flow * (1 + 0.01 * normal())).toPrecision(4));
  }
  return { firstDay, values, flags: new Uint8Array(days) };
}
