import { dayNumber } from '../lib/calendar/day.ts';
import { FLAG } from '../lib/series/daily-series.ts';
import { NO_ROW } from '../lib/series/day-codes.ts';
import type { RandomStream } from './random.ts';
import type { Traits } from './traits.ts';
import type { Weather } from './weather.ts';

/** A record as an archive would hand it out: values in m³/s, and one code a day. */
export interface ObservedRecord {
  firstDay: number;
  /** NaN where missing */
  values: Float64Array;
  /** index into CODES; NO_ROW where the archive has no row for the day */
  codes: Uint8Array;
}

/** Quality codes as written, and what they mean. */
export const CODES = [
  { text: '', bits: 0 },
  { text: 'est', bits: FLAG.estimated },
  { text: 'prov', bits: FLAG.provisional },
  { text: 'ice', bits: FLAG.ice },
] as const;
const [, ESTIMATED, PROVISIONAL, ICE] = [0, 1, 2, 3];

const CUBIC_FEET = 35.3147;
/** °C, mean of about a week, below which ice backs up the water at the gauge. */
const ICE_BELOW = -1;

/** What a gauge writes down of the true flow: rounded, with gaps, flags, and the trouble that its traits name.
 *  @param flow    true flow on every day of the weather, m³/s
 *  @param cooler  °C at the gauge below the mouth's temperature: cold gauges freeze up */
export function observe(
  weather: Weather,
  flow: Float64Array,
  traits: Traits,
  cooler: number,
  random: RandomStream,
): ObservedRecord {
  const from = traits.firstDay - weather.firstDay;
  const to = traits.lastDay + 1 - weather.firstDay;
  const values = new Float64Array(to - from);
  const codes = new Uint8Array(to - from);
  const provisional = traits.provisionalFrom - traits.firstDay;
  // A week's memory of the cold: rivers freeze late and thaw late.
  let cold = 5;
  for (let i = 0; i < values.length; i += 1) {
    values[i] = asWritten(flow[from + i]);
    cold += (weather.temperature[from + i] - cooler - cold) / 8;
    codes[i] = i >= provisional ? PROVISIONAL : cold < ICE_BELOW ? ICE : 0;
  }
  slipUnit(traits, values);
  estimateSome(values, codes, random);
  loseSome(traits, values, codes, random);
  return { firstDay: traits.firstDay, values, codes };
}

/** Four significant digits at most, and no finer than a litre a second. */
export function asWritten(flow: number): number {
  const steps = flow < 10 ? 1000 : flow < 100 ? 100 : flow < 1000 ? 10 : 1;
  return Math.round(flow * steps) / steps;
}

/** Indices of the days of calendar years first..last, cut to the record. */
function daysOf(firstDay: number, length: number, [first, last]: readonly [number, number]): [number, number] {
  const clip = (day: number) => Math.max(0, Math.min(length, day - firstDay));
  return [clip(dayNumber(first, 1, 1)), clip(dayNumber(last + 1, 1, 1))];
}

/** Some years were copied in cubic feet a second under the heading of cubic metres. */
function slipUnit(traits: Traits, values: Float64Array): void {
  if (!traits.cubicFeetYears) return;
  const [from, to] = daysOf(traits.firstDay, values.length, traits.cubicFeetYears);
  for (let i = from; i < to; i += 1) values[i] = asWritten(values[i] * CUBIC_FEET);
}

/** A few stretches a decade were estimated afterwards: drawn as a straight line from before to after. */
function estimateSome(values: Float64Array, codes: Uint8Array, random: RandomStream): void {
  for (let at = random.below(2000); at < values.length - 20; at += 400 + random.below(2400)) {
    const length = 2 + random.below(12);
    const [before, after] = [values[at], values[at + length]];
    for (let k = 1; k < length; k += 1) {
      values[at + k] = asWritten(before + ((after - before) * k) / length);
      if (codes[at + k] === 0) codes[at + k] = ESTIMATED;
    }
  }
}

/** Gauges fail: about one gap in two years, most of a few days, one in thirty of a month or more. Rows of short gaps stay
 *  in the archive without a value; years that were closed have no rows. */
function loseSome(traits: Traits, values: Float64Array, codes: Uint8Array, random: RandomStream): void {
  for (let at = random.below(700); at < values.length; at += 60 + Math.round(600 * random.exponential())) {
    const length = random.uniform() < 1 / 30 ? 25 + random.below(60) : 1 + Math.floor(2.5 * random.exponential());
    values.fill(Number.NaN, at, at + length);
    codes.fill(0, at, at + length);
  }
  if (!traits.gapYears) return;
  const [from, to] = daysOf(traits.firstDay, values.length, traits.gapYears);
  values.fill(Number.NaN, from, to);
  codes.fill(NO_ROW, from, to);
}
