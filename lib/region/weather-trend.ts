import type { ResolvedBasis } from '../basis.ts';
import { antecedentSum } from '../series/antecedent-sum.ts';
import { quantityWords } from '../series/quantities.ts';
import { lowess } from '../statistics/lowess.ts';
import { rankCorrelation } from '../statistics/rank-correlation.ts';
import { orNull } from './or-null.ts';
import type { NamedSite, PairTrend, WeatherQuantity, WeatherTrend, WeatherYear } from './pair-types.ts';
import { detectablePercent } from './single-detectable.ts';
import { meanOf, singleTrend } from './single-trend.ts';
import { weatherSentence, weatherWarnings } from './weather-words.ts';

/** A curve through fewer points follows each of them. */
const FEWEST_FOR_CURVE = 10;

/** Numbers of days that are offered. */
const OFFERED_DAYS = [30, 90, 180, 270, 365];

export type WeatherTerms = Pick<ResolvedBasis, 'days' | 'period' | 'serialCorrection' | 'alpha'>;

export interface WeatherInput {
  station: NamedSite;
  /** usable years with their n-day minima (m³/s) and the day number of each */
  minima: { years: readonly number[]; minima: readonly number[]; days: readonly number[] };
  quantity: WeatherQuantity;
  /** where the weather was measured */
  from: NamedSite;
  /** mm a day, NaN where missing */
  weather: { firstDay: number; values: Float64Array };
  /** days summed, those that end with the date of the minimum: 1–731 */
  antecedentDays: number;
}

/** Trend of annual minima given the weather before each of them.
 *
 *  For every usable year the weather of the days that end with the date of the minimum is summed; a LOWESS curve (span
 *  2/3, three robust rounds) of minimum on sum says what such weather usually leaves; the trend is that of what the
 *  minima lie above or below it, by the basis's test and serial correction.
 *  @param seed  names the random draws of a serial correction that draws
 *  @returns     with `problem` where fewer than 10 years have both, or one of the two does not vary
 *  @throws RangeError when antecedentDays is out of range, or lists differ in length
 *  Source: Helsel et al. 2020, USGS TM 4-A3, chapter 12 (Mann–Kendall test on residuals from LOWESS). */
export function weatherTrend(input: WeatherInput, terms: WeatherTerms, seed: string): WeatherTrend {
  const { station, quantity, from, antecedentDays } = input;
  const rows = yearsWithWeather(input, antecedentDays);
  const empty: WeatherTrend = {
    ...{ station, quantity, from, antecedentDays },
    years: [],
    plain: null,
    adjusted: null,
    weather: null,
    detectable: null,
    correlation: null,
    choices: OFFERED_DAYS.map((days) => ({ antecedentDays: days, correlation: correlationOver(input, days) })),
    sentence: '',
    warnings: [],
    problem: null,
  };
  const problem = problemOf(rows, input, terms);
  if (problem !== null) return { ...empty, sentence: problem, problem };

  const minima = rows.map(({ minimum }) => minimum);
  const sums = rows.map(({ weather }) => weather);
  const curve = lowess(sums, minima);
  const years: WeatherYear[] = rows.map((row, i) => ({
    ...row,
    fitted: curve[i],
    residual: row.minimum - curve[i],
  }));
  const { serialCorrection, alpha } = terms;
  const trendOf = (values: number[], mean: number, label: string): PairTrend | null =>
    singleTrend({ years: rows.map(({ year }) => year), values, label }, { serialCorrection, mean, seed });
  const mean = meanOf(minima);
  const left = {
    years: rows.map(({ year }) => year),
    values: years.map(({ residual }) => residual),
    label: 'given the weather',
  };
  const adjusted = trendOf(left.values, mean, left.label);
  const trend: WeatherTrend = {
    ...empty,
    years,
    plain: trendOf(minima, mean, station.code),
    adjusted,
    detectable:
      (adjusted?.p ?? 1) < alpha ? null : detectablePercent(left, adjusted, { mean, serialCorrection, alpha, seed }),
    weather: trendOf(sums, meanOf(sums), quantity),
    correlation: orNull(rankCorrelation(sums, minima)),
  };
  return {
    ...trend,
    sentence: weatherSentence(trend, terms),
    warnings: weatherWarnings(trend, terms, input.minima.years.length),
  };
}

function yearsWithWeather({ minima, weather }: WeatherInput, antecedentDays: number) {
  const { years, minima: values, days } = minima;
  if (years.length !== values.length || years.length !== days.length) {
    throw new RangeError(
      `weatherTrend: years, minima and days must have the same length, got ${years.length}, ${values.length} and ${days.length}`,
    );
  }
  return years
    .map((year, i) => ({
      ...{ year, minimum: values[i] },
      weather: antecedentSum(weather, days[i], antecedentDays),
    }))
    .filter((row) => !Number.isNaN(row.weather));
}

function correlationOver(input: WeatherInput, antecedentDays: number): number | null {
  const rows = yearsWithWeather(input, antecedentDays);
  return orNull(
    rankCorrelation(
      rows.map(({ weather }) => weather),
      rows.map(({ minimum }) => minimum),
    ),
  );
}

function problemOf(
  rows: readonly { minimum: number; weather: number }[],
  { minima, quantity, from, antecedentDays }: WeatherInput,
  { days, period }: WeatherTerms,
): string | null {
  if (rows.length < FEWEST_FOR_CURVE) {
    const words = quantityWords(quantity);
    const within = period ? ` of ${period.join('–')}` : '';
    return `${rows.length} of ${minima.years.length} usable years${within} have the ${words} of the ${antecedentDays} days before the minimum at ${from.name || from.code}; ${FEWEST_FOR_CURVE} are needed. Choose other weather, or other years in the basis.`;
  }
  const varies = (values: readonly number[]) => values.some((value) => value !== values[0]);
  if (!varies(rows.map(({ minimum }) => minimum)))
    return `All ${days}-day minima are equal: there is nothing to explain.`;
  if (!varies(rows.map(({ weather }) => weather))) {
    return `The ${quantityWords(quantity)} before the minima is the same in all years: it can explain nothing. Choose more days.`;
  }
  return null;
}
