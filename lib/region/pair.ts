import type { ResolvedBasis } from '../basis.ts';
import { rankCorrelation } from '../statistics/rank-correlation.ts';
import { orNull } from './or-null.ts';
import { problemBeforehand, problemOfCommonYears, problemOfRatios } from './pair-problems.ts';
import type { PairComparison, PairYear } from './pair-types.ts';
import { pairSentence, pairWarnings } from './pair-words.ts';
import type { RankingRow } from './ranking-types.ts';
import { detectablePercent } from './single-detectable.ts';
import { FEWEST_FOR_TREND, meanOf, singleTrend } from './single-trend.ts';
import type { YearlySeries } from './trend-family.ts';

/** What a comparison reads of a station's row in the ranking. */
export type PairSite = Pick<
  RankingRow,
  'code' | 'name' | 'river' | 'influence' | 'derivedFrom' | 'years' | 'values' | 'drying'
>;

export type PairTerms = Pick<ResolvedBasis, 'index' | 'days' | 'period' | 'serialCorrection' | 'alpha'>;

/** A station against a reference station, or against the mean of several, year by year over the years that all have.
 *
 *  Each figure is taken over its station's own mean of the common years, so that no large river outweighs a small one;
 *  the reference is the mean of these, and the ratio the station's over it. Weather that the stations share leaves the
 *  ratio level; what one of them alone undergoes bends it, and the line of the double-mass curve with it. The ratio is
 *  tested as the ranking tests a station, by itself and without adjustment.
 *  @param seed  names the random draws of a serial correction that draws
 *  @returns     with `problem`, and without figures, where the stations cannot be compared
 *  @throws RangeError without a reference, for the station against itself, and for one reference named twice
 *  Source: double-mass curve: Searcy & Hardison 1960, USGS WSP 1541-B; comparison with an undisturbed catchment: Helsel et
 *  al. 2020, USGS TM 4-A3, chapter 12 (removing the variation of an exogenous variable before a test for trend). */
export function comparePair(
  station: PairSite,
  references: readonly PairSite[],
  terms: PairTerms,
  seed: string,
): PairComparison {
  checkReferences(station, references);
  const problem = problemBeforehand(station, references, terms);
  if (problem !== null) return withoutFigures(station, references, problem);

  const { years, values } = commonYears([station, ...references]);
  const means = values.map(meanOf);
  const late = problemOfCommonYears([station, ...references], years, means, terms);
  if (late !== null) return withoutFigures(station, references, late);

  const table = yearsOfPair(years, values, means);
  const compared = table.filter(({ ratio }) => !Number.isNaN(ratio));
  if (compared.length < FEWEST_FOR_TREND) {
    return {
      ...withoutFigures(station, references, problemOfRatios(compared.length, table.length, terms)),
      years: table,
    };
  }

  const comparison: PairComparison = {
    ...withoutFigures(station, references, ''),
    years: table,
    ...trendsOf(table, compared, station.code, terms, seed),
    correlation: orNull(
      rankCorrelation(
        values[0],
        table.map(({ reference }) => reference),
      ),
    ),
    problem: null,
  };
  return {
    ...comparison,
    sentence: pairSentence(comparison, terms),
    warnings: pairWarnings(comparison, station, references),
  };
}

/** Each series by itself, and where the ratio's trend is not found, the one that would have been. */
function trendsOf(
  table: readonly PairYear[],
  compared: readonly PairYear[],
  code: string,
  { serialCorrection, alpha }: PairTerms,
  seed: string,
): Pick<PairComparison, 'stationTrend' | 'referenceTrend' | 'ratioTrend' | 'detectable'> {
  const seriesOf = (rows: readonly PairYear[], label: string, figure: (row: PairYear) => number) => ({
    years: rows.map(({ year }) => year),
    values: rows.map(figure),
    label,
  });
  const trendOf = (series: YearlySeries) =>
    singleTrend(series, { serialCorrection, mean: meanOf(series.values), seed });
  const ratios = seriesOf(compared, 'ratio', ({ ratio }) => ratio);
  const ratioTrend = trendOf(ratios);
  const isFound = (ratioTrend?.p ?? 1) < alpha;
  return {
    stationTrend: trendOf(seriesOf(table, code, (row) => row.station)),
    referenceTrend: trendOf(seriesOf(table, 'reference', ({ reference }) => reference)),
    ratioTrend,
    detectable: isFound
      ? null
      : detectablePercent(ratios, ratioTrend, { mean: meanOf(ratios.values), serialCorrection, alpha, seed }),
  };
}

function checkReferences(station: PairSite, references: readonly PairSite[]): void {
  if (references.length === 0) throw new RangeError('comparePair: references must name at least one station, got none');
  const codes = references.map(({ code }) => code);
  if (codes.includes(station.code)) {
    throw new RangeError(`comparePair: references must not hold the station itself, got ${station.code}`);
  }
  const twice = codes.find((code, i) => codes.indexOf(code) !== i);
  if (twice !== undefined) throw new RangeError(`comparePair: references must differ, got ${twice} twice`);
}

/** The years that all have, rising, and each site's figures in them. */
function commonYears(sites: readonly PairSite[]): { years: number[]; values: number[][] } {
  const byYear = sites.map(({ years, values }) => new Map(years.map((year, i) => [year, values[i]])));
  const years = sites[0].years.filter((year) => byYear.every((figures) => figures.has(year)));
  return { years, values: byYear.map((figures) => years.map((year) => figures.get(year) ?? Number.NaN)) };
}

/** @param values  of the station first, then of each reference; alongside `years` */
function yearsOfPair(years: readonly number[], values: readonly number[][], means: readonly number[]): PairYear[] {
  let [stationSum, referenceSum] = [0, 0];
  return years.map((year, i) => {
    const [own, ...others] = values.map((figures, site) => figures[i] / means[site]);
    const reference = meanOf(others);
    stationSum += own;
    referenceSum += reference;
    const ratio = reference > 0 ? own / reference : Number.NaN;
    return { year, station: values[0][i], reference, ratio, stationSum, referenceSum };
  });
}

function withoutFigures(station: PairSite, references: readonly PairSite[], problem: string): PairComparison {
  const named = ({ code, name }: PairSite) => ({ code, name });
  return {
    station: named(station),
    references: references.map(named),
    years: [],
    stationTrend: null,
    referenceTrend: null,
    ratioTrend: null,
    detectable: null,
    correlation: null,
    sentence: problem,
    warnings: [],
    problem,
  };
}
