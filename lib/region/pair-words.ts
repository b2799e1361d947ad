import { INDEX_FACTS } from './index-facts.ts';
import { indexOfYear } from './index-of-year.ts';
import type { PairSite, PairTerms } from './pair.ts';
import type { PairComparison, PairTrend } from './pair-types.ts';
import { detectableWords, intervalWords, plain, probability, signed } from './sentence-figures.ts';
import { called, counted, listed } from './site-words.ts';

/** Fewer common years than this are shown with a warning. */
const FEW_YEARS = 10;

/** From this share of zeros on, slopes of exactly 0 are common without any trend. */
const MARKED_ZERO_SHARE = 0.1;

/** What a comparison came to, in plain words with figures.
 *  Example: "Against Aune at Fell, the 7-day minimum of Bruck at Ede lost 6.2 % of the mean ratio per decade (95 % interval
 *  −9.1 to −2.8; p 0.003), 1985–2024, 38 common years. By itself it changed by −7 % of its mean per decade, the reference
 *  by −0.9 %. Weather that they share does not explain this: something changed at the station or at the reference." */
export function pairSentence(comparison: PairComparison, terms: PairTerms): string {
  const { station, ratioTrend, years } = comparison;
  if (!ratioTrend) return comparison.sentence;
  const what = `${indexOfYear(terms)} of ${called(station)}`;
  const where = `${years[0].year}–${years[years.length - 1].year}, ${counted(years.length, 'common year')}`;
  const amount = ratioTrend.percentPerDecade ?? Number.NaN;
  const figures = `(${intervalWords(ratioTrend.percentLow, ratioTrend.percentHigh)}; p ${probability(ratioTrend.p)}), ${where}`;
  const alone = aloneWords(comparison);
  if (!((ratioTrend.p ?? 1) < terms.alpha)) {
    return `No significant change against ${referenceWords(comparison)}: the ratio of the ${what} to it changed by ${signed(amount)} % of its mean per decade ${figures}. ${alone}${detectableWords(comparison.detectable)} This does not show that nothing changed.`;
  }
  const drier = INDEX_FACTS[terms.index].moreIsDrier ? amount > 0 : amount < 0;
  return `Against ${referenceWords(comparison)}, the ${what} ${amount < 0 ? 'lost' : 'gained'} ${plain(Math.abs(amount))} % of the mean ratio per decade ${figures}: ${
    drier ? 'drier' : 'wetter'
  } than the reference would have it. ${alone} Weather that they share does not explain this: something changed at the station or at the reference.`;
}

/** The reference, or the mean of several. */
function referenceWords({ references }: Pick<PairComparison, 'references'>): string {
  return `${references.length > 1 ? 'the mean of ' : ''}${listed(references.map(called))}`;
}

function aloneWords({ stationTrend, referenceTrend }: PairComparison): string {
  const percent = (trend: PairTrend | null) => signed(trend?.percentPerDecade ?? Number.NaN);
  return `By itself the station changed by ${percent(stationTrend)} % of its mean per decade, the reference by ${percent(referenceTrend)} %.`;
}

/** What a reader must know before trusting a comparison. */
export function pairWarnings({ years }: PairComparison, station: PairSite, references: readonly PairSite[]): string[] {
  const warnings: string[] = [];
  if (years.length < FEW_YEARS) {
    warnings.push(`Only ${counted(years.length, 'common year')}: a trend of so few says little.`);
  }
  const without = years.filter(({ ratio }) => Number.isNaN(ratio)).length;
  if (without > 0) {
    warnings.push(`In ${counted(without, 'year')} the reference is not above 0: left out, for there is no ratio to 0.`);
  }
  const zeros = years.filter((each) => each.station === 0).length;
  if (zeros > 0 && zeros >= MARKED_ZERO_SHARE * years.length) {
    warnings.push(
      `${zeros} of ${counted(years.length, 'figure')} of ${called(station)} are zero: the slope is drawn towards 0.`,
    );
  }
  const changed = references.filter(({ influence }) => influence !== 'natural' && influence !== 'unknown');
  for (const reference of changed) {
    warnings.push(`${called(reference)} is ${reference.influence}: what is done there shows in the ratio too.`);
  }
  const unknown = references.filter(({ influence }) => influence === 'unknown').map(called);
  if (unknown.length > 0) {
    const [whether, it] = unknown.length === 1 ? ['is', 'it'] : ['are', 'them'];
    warnings.push(
      `Whether ${listed(unknown)} ${whether} natural is not known: what is done there shows in the ratio too, so look at ${it} first.`,
    );
  }
  const river = riverKey(station);
  const along = references.filter((reference) => river !== '' && riverKey(reference) === river).map(called);
  if (along.length > 0) {
    warnings.push(
      `${listed(along)} ${along.length === 1 ? 'lies' : 'lie'} on the same river: what is done above both shows in neither’s ratio.`,
    );
  }
  const derived = [station, ...references].filter(({ derivedFrom }) => derivedFrom !== undefined).map(called);
  if (derived.length > 0) {
    warnings.push(
      `${listed(derived)} ${derived.length === 1 ? 'is a derived record' : 'are derived records'}: it may share measurements with what it is compared with.`,
    );
  }
  return warnings;
}

const riverKey = ({ river }: PairSite): string => river.trim().toLowerCase();
