import { quantityWords } from '../series/quantities.ts';
import type { PairTrend, WeatherTrend } from './pair-types.ts';
import { detectableWords, intervalWords, plain, probability, signed } from './sentence-figures.ts';
import { called, counted } from './site-words.ts';
import type { WeatherTerms } from './weather-trend.ts';

/** A rank correlation nearer to 0 says that the weather explains next to nothing of the minima. */
const SLIGHT_CORRELATION = 0.3;

/** From this share of zeros on, what lies above or below a curve says little. */
const MARKED_ZERO_SHARE = 0.1;

/** What the trend of the minima given the weather came to, in plain words with figures.
 *  Example: "Given the rainfall of the 180 days before, the 7-day minimum of Bruck at Ede lost 4.1 % of its mean per decade
 *  (95 % interval −6.6 to −1.9; p 0.002), 1985–2024, 38 years. As it is, it changed by −5 % per decade (p 0.01)." */
export function weatherSentence(trend: WeatherTrend, terms: WeatherTerms): string {
  const { station, years, adjusted, plain: asItIs } = trend;
  if (!adjusted) return trend.sentence;
  const amount = amountOf(adjusted);
  const given = `Given the ${weatherWords(trend)}`;
  const what = `the ${terms.days}-day minimum of ${called(station)}`;
  const figures = `(${intervalWords(...amount.interval)}; p ${probability(adjusted.p)}), ${years[0].year}–${
    years[years.length - 1].year
  }, ${counted(years.length, 'year')}`;
  const alone = `As it is, it changed by ${signed(asItIs ? amountOf(asItIs).value : Number.NaN)} ${amount.unit} per decade (p ${probability(asItIs?.p ?? null)}).`;
  if (!((adjusted.p ?? 1) < terms.alpha)) {
    return `${given}, no significant trend is left in ${what}: it changed by ${signed(amount.value)} ${amount.unit} per decade ${figures}. ${alone}${detectableWords(trend.detectable)} This does not show that nothing changed.`;
  }
  return `${given}, ${what} ${amount.value < 0 ? 'lost' : 'gained'} ${plain(Math.abs(amount.value))} ${amount.unit} per decade ${figures}. ${alone}`;
}

/** Example: "rainfall of the 180 days before at Bruck at Ede" */
function weatherWords({ quantity, antecedentDays, from, station }: WeatherTrend): string {
  const where = from.code === station.code ? '' : ` at ${called(from)}`;
  return `${quantityWords(quantity)} of the ${counted(antecedentDays, 'day')} before${where}`;
}

/** In percent of the mean minimum where there is one, else in m³/s. */
function amountOf(trend: PairTrend): { value: number; unit: string; interval: [number | null, number | null] } {
  const { percentPerDecade, percentLow, percentHigh, slopePerDecade, low, high } = trend;
  return percentPerDecade === null
    ? { value: slopePerDecade ?? Number.NaN, unit: 'm³/s', interval: [low, high] }
    : { value: percentPerDecade, unit: '% of its mean', interval: [percentLow, percentHigh] };
}

/** What a reader must know before trusting such a trend.
 *  @param usable  usable years, with and without weather */
export function weatherWarnings(trend: WeatherTrend, terms: WeatherTerms, usable: number): string[] {
  const { years, correlation, weather, quantity } = trend;
  const words = quantityWords(quantity);
  const warnings: string[] = [];
  if (years.length < usable) {
    warnings.push(
      `${counted(usable - years.length, 'usable year')} without enough ${words} before the minimum: left out.`,
    );
  }
  if (correlation === null || Math.abs(correlation) < SLIGHT_CORRELATION) {
    warnings.push(
      `The ${words} of so many days explains little of the minima (rank correlation ${signed(correlation ?? Number.NaN)}): what is left is much the same as without it.`,
    );
  }
  if (weather && (weather.p ?? 1) < terms.alpha) {
    warnings.push(
      `The ${words} itself ${(weather.slopePerDecade ?? 0) < 0 ? 'fell' : 'rose'} (p ${probability(weather.p)}). The curve then takes part of any trend with it, and what is left understates one (Alley 1988).`,
    );
  }
  const zeros = years.filter(({ minimum }) => minimum === 0).length;
  if (zeros > 0 && zeros >= MARKED_ZERO_SHARE * years.length) {
    warnings.push(`${zeros} of ${years.length} minima are zero, where drier weather leaves no mark.`);
  }
  return warnings;
}
