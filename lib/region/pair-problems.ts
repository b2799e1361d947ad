import { indexOfYear } from './index-of-year.ts';
import type { PairSite, PairTerms } from './pair.ts';
import { FEWEST_FOR_TREND } from './single-trend.ts';
import { called, counted, listed } from './site-words.ts';

/** Why stations cannot be compared whatever years they share; null when they can. */
export function problemBeforehand(station: PairSite, references: readonly PairSite[], terms: PairTerms): string | null {
  if (terms.index === 'minimum-date') {
    return 'A ratio of dates means nothing. Choose another annual figure in the basis.';
  }
  const all = [station, ...references];
  const within = terms.period ? ` in ${terms.period.join('–')}` : '';
  const empty = all.filter(({ years }) => years.length === 0).map(called);
  if (empty.length > 0) {
    return `${listed(empty)} ${empty.length === 1 ? 'has' : 'have'} no usable year${within}. Choose another station${
      terms.period ? ', or other years in the basis' : ''
    }.`;
  }
  const dry = all.filter(({ drying }) => drying).map(called);
  if (dry.length > 0) {
    return `${listed(dry)} ${dry.length === 1 ? 'is' : 'are'} listed under Drying: a third or more of the minima are zero, and a ratio says little then. Choose another station, or zero-flow days in the basis.`;
  }
  return null;
}

/** Why the years that all have are not enough; null when they are.
 *  @param means  of each site over those years */
export function problemOfCommonYears(
  sites: readonly PairSite[],
  years: readonly number[],
  means: readonly number[],
  terms: PairTerms,
): string | null {
  if (years.length < FEWEST_FOR_TREND) {
    const have =
      years.length === 0 ? 'no usable year' : `only ${counted(years.length, 'usable year')} (${years.join(', ')})`;
    const period = terms.period ? ` in ${terms.period.join('–')}` : '';
    return `${listed(sites.map(called))} have ${have} in common${period}; ${FEWEST_FOR_TREND} are needed. Choose other references${
      terms.period ? ', or each station’s own years in the basis' : ''
    }.`;
  }
  const flat = sites.filter((_, i) => !(means[i] > 0)).map(called);
  if (flat.length > 0) {
    return `The mean ${indexOfYear(terms)} of ${listed(flat)} is not above 0 over the ${years.length} common years, so that there is nothing to compare with. Choose another station.`;
  }
  return null;
}

/** Why so few ratios are no comparison. */
export function problemOfRatios(ratios: number, years: number, terms: PairTerms): string {
  return `The ${indexOfYear(terms)} of the reference is above 0 in only ${ratios} of the ${years} common years, and there is no ratio to 0; ${FEWEST_FOR_TREND} years are needed. Choose another reference.`;
}
