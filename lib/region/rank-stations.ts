import { type Basis, basisText, type ResolvedBasis } from '../basis.ts';
import { YEARS_PER_DECADE } from '../calendar/decade.ts';
import { checkStartMonth } from '../calendar/low-flow-year.ts';
import { commonPeriod } from './common-period.ts';
import { type Standing, standingOf } from './eligibility.ts';
import { INDEX_FACTS, isOfMinus, perArea, percentOfMean, testedSeries } from './index-facts.ts';
import { orNull } from './or-null.ts';
import { byCode, placesOf } from './places.ts';
import { rankingFigure } from './ranking-figure.ts';
import type { Ranking, RankingRow, StationFacts, StationMinima, Trend } from './ranking-types.ts';
import { warningsOf } from './ranking-warnings.ts';
import { noteOf } from './row-notes.ts';
import { steadinessOf } from './steadiness.ts';
import { type TrendFigures, trendFamily } from './trend-family.ts';
import { judgedYears, type UsedYears, usedYears } from './used-years.ts';

/** A station on its way through the ranking. */
interface Entry {
  row: RankingRow;
  used: UsedYears;
  standing: Standing;
}

/** The stations of a region in order of the trend in their annual minima, or in the basis's other index, most strongly
 *  declining first. Where more of an index is drier (zero-flow days, deficit), minus the index is tested, so that
 *  falling always is drier; slopes keep the index's own sign.
 *
 *  Resolves the common period, says who is ranked and why others are not, tests and adjusts over all ranked stations,
 *  and gives places by the basis's ranking figure. Stations of which a third or more of the flows compared are zero
 *  stand under Drying, in order of the change in zero-flow days per decade, most first: a family of tests of their own,
 *  on minus the days.
 *  @param stations   annual minima under the basis's days, season, completeness and `yearStart`, with the figures of an
 *                    index that the minima do not bring along; in any order
 *  @param yearStart  start month of those low-flow years, resolved, 1–12
 *  @returns          a row for every station: ranked, then drying, then the others by code
 *  @throws RangeError when `yearStart` is no month, such figures are missing, or one of a usable year is infinite
 *  Sources: Mann–Kendall, Theil–Sen, serial correction and false discovery rate at the functions of `lib/statistics`. */
export function rankRegion(stations: readonly StationMinima[], basis: Basis, yearStart: number): Ranking {
  checkStartMonth('rankRegion', yearStart);
  const resolved = resolveBasis(stations, basis, yearStart);
  const entries = stations.map((each) => entryOf(each, resolved));
  const of = (kind: Standing['kind']) => entries.filter(({ standing }) => standing.kind === kind);

  const ranked = rank(of('ranked'), resolved);
  const drying = orderDrying(of('drying'), resolved);
  const unranked = of('unranked').sort((a, b) => byCode(a.row.code, b.row.code));
  const all = [...ranked, ...drying, ...unranked];
  for (const { row, used } of all) row.note = noteOf(row, used, resolved);

  const rows = all.map(({ row }) => row);
  const withTrend = (trend: Trend) => ranked.filter(({ row }) => row.trend === trend).length;
  const counts = {
    stations: rows.length,
    ranked: ranked.length,
    drying: drying.length,
    unranked: unranked.length,
    falling: withTrend('falling'),
    rising: withTrend('rising'),
  };
  return { basis: resolved, rows, counts, warnings: warningsOf(rows, resolved, counts) };
}

function resolveBasis(stations: readonly StationMinima[], basis: Basis, yearStart: number): ResolvedBasis {
  const period =
    basis.period === 'common'
      ? commonPeriod(
          stations.map(({ minima, figures }) => judgedYears(minima, basis.index, figures ?? null)),
          basis,
          INDEX_FACTS[basis.index].zeroRule,
        ).period
      : basis.period;
  return { ...basis, period, yearStart, asked: { period: basis.period, yearStart: basis.yearStart } };
}

/** A row with all that needs no test. */
function entryOf({ station, minima, figures }: StationMinima, basis: ResolvedBasis): Entry {
  const used = usedYears(minima, basis.period, basis.index, figures);
  checkFinite(station.code, used, basis);
  const standing = standingOf(used, basis.period, basis);
  const n = used.years.length;
  const meanMinimum = meanOf(used.minima);
  const row: RankingRow = {
    ...factsOf(station),
    rank: null,
    rankLow: null,
    rankHigh: null,
    yearsUsed: n,
    firstYear: n ? used.years[0] : null,
    lastYear: n ? used.years[n - 1] : null,
    meanMinimum,
    meanMinimumSpecific: perArea(meanMinimum, 'minimum', station.areaKm2),
    slopePerDecade: null,
    slopeLow: null,
    slopeHigh: null,
    percentPerDecade: null,
    specificPerDecade: null,
    tau: null,
    z: null,
    p: null,
    pAdjusted: null,
    trend: null,
    trendOf: null,
    zeroFlowYears: used.zeroMinima,
    zeroDaysPerDecade: null,
    zeroDaysLow: null,
    zeroDaysHigh: null,
    unrankedReason: standing.kind === 'ranked' ? null : standing.reason,
    drying: standing.kind === 'drying',
    note: '',
    r1: null,
    serialFactor: null,
    intercept: null,
    years: used.years,
    minima: used.minima,
    index: basis.index,
    values: used.values,
    meanValue: meanOf(used.values),
    valueSlope: null,
    valueSlopeLow: null,
    valueSlopeHigh: null,
    steadiness: null,
  };
  return { row, used, standing };
}

function checkFinite(code: string, { years, minima, values }: UsedYears, { index }: ResolvedBasis): void {
  years.forEach((year, i) => {
    if (Number.isFinite(minima[i]) && Number.isFinite(values[i])) return;
    const [name, value] = Number.isFinite(minima[i]) ? [index, values[i]] : ['minimum', minima[i]];
    throw new RangeError(`rankRegion: ${name} of ${code} in ${year} must be a finite number, got ${value}`);
  });
}

function rank(entries: readonly Entry[], basis: ResolvedBasis): Entry[] {
  const trendOf = basis.index === 'minimum' ? 'minima' : basis.index;
  const figures = trendFamily(
    entries.map(({ row }) => ({ ...testedSeries({ ...row, trendOf }), label: row.code })),
    basis.serialCorrection,
    seedOf(basis),
  );
  entries.forEach(({ row }, i) => {
    takeTest(row, figures[i], basis, trendOf);
    row.percentPerDecade = percentOfMean(row.valueSlope, basis.index, row.meanValue);
    if (INDEX_FACTS[basis.index].isFlow) {
      row.slopePerDecade = row.valueSlope;
      row.slopeLow = row.valueSlopeLow;
      row.slopeHigh = row.valueSlopeHigh;
      row.specificPerDecade = perArea(row.slopePerDecade, basis.index, row.areaKm2);
    }
  });
  const { order, place } = placesOf(
    entries.map(({ row }) => ({ figure: rankingFigure(row, basis.rankBy), code: row.code })),
  );
  entries.forEach(({ row }, i) => {
    row.rank = place[i];
  });
  return order.map((i) => entries[i]);
}

function orderDrying(entries: readonly Entry[], basis: ResolvedBasis): Entry[] {
  for (const { row, used } of entries) {
    row.index = 'zero-flow-days';
    row.values = used.zeroDays;
    row.meanValue = meanOf(row.values);
  }
  const figures = trendFamily(
    entries.map(({ row }) => ({ ...testedSeries({ ...row, trendOf: 'zero-days' }), label: row.code })),
    basis.serialCorrection,
    seedOf(basis),
  );
  entries.forEach(({ row }, i) => {
    takeTest(row, figures[i], basis, 'zero-days');
    row.zeroDaysPerDecade = row.valueSlope;
    row.zeroDaysLow = row.valueSlopeLow;
    row.zeroDaysHigh = row.valueSlopeHigh;
  });
  const { order } = placesOf(
    entries.map(({ row }) => ({
      figure: row.zeroDaysPerDecade === null ? null : -row.zeroDaysPerDecade,
      code: row.code,
    })),
  );
  return order.map((i) => entries[i]);
}

/** The figures of a test, slopes turned back to the sign of the values where minus the values were tested. */
function takeTest(
  row: RankingRow,
  figures: TrendFigures,
  { alpha, period }: ResolvedBasis,
  trendOf: NonNullable<RankingRow['trendOf']>,
): void {
  const { z, p, tau, pAdjusted, r1, serialFactor, slope, low, high, intercept } = figures;
  row.z = orNull(z);
  row.p = orNull(p);
  row.tau = orNull(tau);
  row.pAdjusted = orNull(pAdjusted);
  row.r1 = orNull(r1);
  row.serialFactor = serialFactor;
  row.trendOf = trendOf;
  if (!(pAdjusted < alpha)) row.trend = 'none';
  else row.trend = z < 0 ? 'falling' : 'rising';
  const turned = isOfMinus(trendOf);
  const sign = turned ? -1 : 1;
  row.valueSlope = orNull(sign * slope * YEARS_PER_DECADE);
  row.valueSlopeLow = orNull(sign * (turned ? high : low) * YEARS_PER_DECADE);
  row.valueSlopeHigh = orNull(sign * (turned ? low : high) * YEARS_PER_DECADE);
  row.intercept = orNull(sign * intercept);
  row.steadiness = steadinessOf(testedSeries(row), period).share;
}

function meanOf(values: readonly number[]): number | null {
  return values.length ? values.reduce((sum, value) => sum + value, 0) / values.length : null;
}

/** Names random draws together with a series' own values, so that what shaped these need not be named again. */
const seedOf = (basis: ResolvedBasis): string => basisText(basis, ['index', 'serialCorrection']);

function factsOf(station: StationFacts): StationFacts {
  const { id, code, name, river, latitude, longitude, areaKm2, influence, derivedFrom } = station;
  const facts = { id, code, name, river, latitude, longitude, areaKm2, influence };
  return derivedFrom === undefined ? facts : { ...facts, derivedFrom };
}
