import { dayNumber } from '../lib/calendar/day.ts';
import { NO_ROW } from '../lib/series/day-codes.ts';
import type { Quantity, Unit } from '../lib/series/quantities.ts';
import type { MarkSpan } from '../lib/store/marks-on-flags.ts';
import type { Catchment } from './catchment-flow.ts';
import { CODES } from './observe.ts';
import type { RandomStream } from './random.ts';
import type { Traits } from './traits.ts';
import type { Weather } from './weather.ts';

/** A daily record kept beside a station's flow. */
export interface SeedBeside {
  code: string;
  quantity: Quantity;
  unit: Unit;
  firstDay: number;
  values: Float64Array;
  codes: Uint8Array;
  codeList: { text: string; bits: number }[];
}

const CODE_LIST = [{ text: '', bits: 0 }];
const dayFrom = (code: string, quantity: Quantity, unit: Unit, firstDay: number, values: Float64Array): SeedBeside => ({
  ...{ code, quantity, unit, firstDay, values },
  codes: Uint8Array.from(values, (value) => (Number.isNaN(value) ? NO_ROW : 0)),
  codeList: CODE_LIST.map((each) => ({ ...each })),
});
const tenths = (value: number) => Math.round(value * 10) / 10;

/** Year from which levels are kept. */
const STAGE_FROM = 1990;
/** By how much a rebuilt weir lifts the levels, cm. */
const WEIR_LIFT_CM = 14;

/** Levels at the gauge in cm, by a rating of the usual form Q = k·h^(5/3).
 *  @param weirDay  day from which a rebuilt weir lifts them; null for none */
export function stageBeside(
  code: string,
  { firstDay, values }: { firstDay: number; values: Float64Array },
  { areaKm2, weirDay }: { areaKm2: number; weirDay: number | null },
): SeedBeside {
  const skip = Math.max(0, dayNumber(STAGE_FROM, 1, 1) - firstDay);
  const k = 1.2 * Math.sqrt(areaKm2);
  const levels = values.slice(skip).map((flow, i) => {
    const lift = weirDay !== null && firstDay + skip + i >= weirDay ? WEIR_LIFT_CM : 0;
    return tenths(8 + lift + 100 * (Math.max(0, flow) / k) ** 0.6);
  });
  return dayFrom(code, 'stage', 'cm', firstDay + skip, levels);
}

/** Year from which the weather is kept. */
const WEATHER_FROM = 1975;

/** Rainfall and potential evaporation of a station's own land, mm a day. */
export function weatherBeside(
  code: string,
  weather: Weather,
  land: Catchment,
  { firstDay, lastDay }: Pick<Traits, 'firstDay' | 'lastDay'>,
  random: RandomStream,
): SeedBeside[] {
  const first = Math.max(firstDay, dayNumber(WEATHER_FROM, 1, 1));
  const rain = new Float64Array(lastDay + 1 - first);
  const thirst = new Float64Array(rain.length);
  for (let i = 0; i < rain.length; i += 1) {
    const day = first + i - weather.firstDay;
    let depth = 0;
    for (const [k, corner] of weather.rain.entries()) depth += land.corners[k] * corner[day];
    rain[i] = tenths(depth * land.rainFactor);
    const degrees = weather.temperature[day] - land.cooler;
    const daylight = 1 - 0.6 * Math.cos(2 * Math.PI * (weather.season[day] + 0.03));
    thirst[i] = degrees > 0 ? tenths(0.14 * degrees * daylight) : 0;
  }
  // A rain gauge is out of order now and then.
  for (let at = random.below(900); at < rain.length; at += 300 + random.below(1500)) {
    rain.fill(Number.NaN, at, at + 1 + random.below(6));
  }
  return [dayFrom(code, 'rainfall', 'mm', first, rain), dayFrom(code, 'potential-evaporation', 'mm', first, thirst)];
}

/** Year from which the water works meters what it pumps: too few years to be ranked. */
const METERED_FROM = 2009;

/** What a water works pumps out of the river, L/s: about what is taken, more or less as the town drinks from day to day.
 *  @param taken  m³/s on every day of the weather */
export function pumpedBeside(
  code: string,
  weather: Weather,
  taken: Float64Array,
  { lastDay }: Traits,
  random: RandomStream,
): SeedBeside {
  const first = dayNumber(METERED_FROM, 1, 1);
  let thirst = 0;
  const values = taken.subarray(first - weather.firstDay, lastDay + 1 - weather.firstDay).map((flow) => {
    thirst = 0.7 * thirst + 0.06 * (random.uniform() - 0.5);
    return Math.round(1000 * flow * (1 + thirst));
  });
  return dayFrom(code, 'flow', 'L/s', first, values);
}

/** m³/s from a square kilometre: metres of water on one day, more than ever fall. */
const BURST_PER_KM2 = 40;
/** Days that were copied into the place of others: a month. */
const COPIED_DAYS = 31;

/** What a person said of some days. */
export interface SeedMark extends MarkSpan {
  reason: string;
  by: string;
}

/** Plants what the checks of a record should find, changing `values` and `codes`: days that the logger repeated, a slipped
 *  decimal point, a month copied over another, a day with more water than falls, and a few days below zero.
 *  @returns what a person has said to two of them */
export function plantFaults(
  { firstDay, values, codes }: { firstDay: number; values: Float64Array; codes: Uint8Array },
  areaKm2: number,
): SeedMark[] {
  const at = (share: number) => {
    let day = Math.floor(share * values.length);
    while (!(values[day - 1] > 0 && values[day] > 0 && values[day + 1] > 0)) day += 1;
    return day;
  };
  const write = (day: number, value: number) => {
    values[day] = Math.round(value * 1000) / 1000;
    if (CODES[codes[day]]?.text === 'ice') codes[day] = 0;
  };
  const stuck = at(0.35);
  for (let k = 1; k < 17; k += 1) write(stuck + k, values[stuck]);
  const slipped = at(0.6);
  write(slipped, 100 * values[slipped]);
  const copied = at(0.7);
  // from the same season two years before: it looks right
  for (let k = 0; k < COPIED_DAYS; k += 1) {
    const earlier = values[copied + k - 2 * 365];
    if (!Number.isNaN(earlier)) write(copied + k, earlier);
  }
  const below = at(0.8);
  for (let k = 0; k < 4; k += 1) write(below + k, -0.02 - 0.01 * k);
  const burst = at(0.9);
  write(burst, BURST_PER_KM2 * areaKm2);
  const mark = (from: number, days: number, kind: SeedMark['kind'], reason: string): SeedMark => ({
    ...{ firstDay: firstDay + from, lastDay: firstDay + from + days - 1, kind, reason, by: 'seed' },
  });
  return [
    mark(burst, 1, 'reject', 'No storm on that day, and the gauge below saw nothing: the sensor was being cleaned.'),
    mark(
      copied,
      COPIED_DAYS,
      'note',
      'The same month stands two years before. The archive was asked for the right one.',
    ),
  ];
}
