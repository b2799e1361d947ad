import { dateOfDay, daysInMonth } from '../calendar/day.ts';

const DAYS_PER_WEEK = 7;
const MONTHS = 12;

/** A week with fewer days of flow says too little of it. */
const FEWEST_DAYS = 4;

/** Log flow of a station by the week, its season taken out. */
export interface WeeklyAnomalies {
  /** number of the first week: ⌊day number/7⌋, so that weeks are the same for all stations */
  firstWeek: number;
  /** NaN where the week has fewer than 4 days with a flow above 0 */
  values: Float32Array;
}

/** Weekly means of log flow less the station's mean log flow of the calendar month, over days with a flow above 0: a dry
 *  river has no log, and counts as missing.
 *  @param firstDay  day number of `flow[0]`
 *  @param flow      daily, in any unit, NaN where missing */
export function weeklyAnomalies(firstDay: number, flow: Float64Array): WeeklyAnomalies {
  const firstWeek = Math.floor(firstDay / DAYS_PER_WEEK);
  const weeks = flow.length === 0 ? 0 : Math.floor((firstDay + flow.length - 1) / DAYS_PER_WEEK) - firstWeek + 1;
  const months = monthOfDays(firstDay, flow.length);
  const logs = flow.map((value) => (value > 0 ? Math.log(value) : Number.NaN));
  const means = monthlyMeans(logs, months);
  const sums = new Float64Array(weeks);
  const counts = new Uint8Array(weeks);
  for (let i = 0; i < logs.length; i++) {
    if (Number.isNaN(logs[i])) continue;
    const week = Math.floor((firstDay + i) / DAYS_PER_WEEK) - firstWeek;
    sums[week] += logs[i] - means[months[i]];
    counts[week]++;
  }
  const values = Float32Array.from(sums, (sum, i) => (counts[i] >= FEWEST_DAYS ? sum / counts[i] : Number.NaN));
  return { firstWeek, values };
}

/** Calendar month of each day, January = 0. */
function monthOfDays(firstDay: number, days: number): Uint8Array {
  const months = new Uint8Array(days);
  for (let i = 0; i < days; ) {
    const { year, month, day } = dateOfDay(firstDay + i);
    const end = i + daysInMonth(year, month) - day + 1;
    months.fill(month - 1, i, end);
    i = end;
  }
  return months;
}

function monthlyMeans(logs: Float64Array, months: Uint8Array): Float64Array {
  const sums = new Float64Array(MONTHS);
  const counts = new Float64Array(MONTHS);
  for (let i = 0; i < logs.length; i++) {
    if (Number.isNaN(logs[i])) continue;
    sums[months[i]] += logs[i];
    counts[months[i]]++;
  }
  return sums.map((sum, month) => sum / counts[month]);
}
