import { describe, expect, test } from 'vitest';
import type { Basis } from '../../../lib/basis.ts';
import { certaintyOfRows, simulateStations, simulationTerms } from '../../../lib/region/certainty.ts';
import { chanceAmong } from '../../../lib/region/certainty-types.ts';
import { rankRegion } from '../../../lib/region/rank-stations.ts';
import type { Ranking, StationMinima } from '../../../lib/region/ranking-types.ts';
import { simulatedRow } from '../../../lib/region/simulated-family.ts';
import { withCertainty } from '../../../lib/region/sure-rows.ts';
import { mannKendall } from '../../../lib/statistics/mann-kendall.ts';
import { seeded } from '../../seeded.ts';
import { annualMinima, basisOf, constant, facts, station, YEAR_START } from './region-fixtures.ts';

const MEAN = 100;
/** standard deviation of the minima, percent of their mean */
const SCATTER = 30;

function normals(seed: number): () => number {
  const random = seeded(seed);
  return () => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
}

/** Stations whose minima share half of their weather and carry over by 0.3, with trends in percent per decade. */
function invented(seed: number, trends: readonly number[], years = 40): StationMinima[] {
  const normal = normals(seed);
  const carry = 0.3;
  const state = trends.map(() => normal());
  const values = trends.map(() => [] as number[]);
  for (let year = -20; year < years; year++) {
    const shared = normal();
    trends.forEach((trend, i) => {
      const innovation = Math.sqrt(0.5) * shared + Math.sqrt(0.5) * normal();
      state[i] = carry * state[i] + Math.sqrt(1 - carry ** 2) * innovation;
      const percent = SCATTER * state[i] + (trend * (year - (years - 1) / 2)) / 10;
      if (year >= 0) values[i].push(MEAN * (1 + percent / 100));
    });
  }
  return values.map((each, i) => station(`S${String(i).padStart(2, '0')}`, { first: 1980, values: each }));
}

function certaintyOf({ rows, basis }: Ranking, { parts = 1, replicates = 200 } = {}) {
  const simulated = rows.filter(({ rank, drying }) => rank !== null || drying).map(simulatedRow);
  const terms = simulationTerms(simulated, basis, { replicates, seed: 'test' });
  const size = Math.ceil(simulated.length / parts);
  const made = Array.from({ length: parts }, (_, part) =>
    simulateStations(simulated.slice(part * size, (part + 1) * size), structuredClone(terms)),
  );
  const joined = {
    figures: Float64Array.from(made.flatMap(({ figures }) => Array.from(figures))),
    detectable: Float64Array.from(made.flatMap(({ detectable }) => Array.from(detectable))),
  };
  return certaintyOfRows(simulated, joined, terms);
}

const rank = (stations: readonly StationMinima[], keys: Partial<Basis> = {}) =>
  rankRegion(stations, basisOf({ period: null, ...keys }), YEAR_START);

describe('rank spans, by simulation', () => {
  /** Share of spans that hold the true place, and mean share of the places that a span has. */
  function tried(regions: number, trendsOf: (normal: () => number) => number[]) {
    let held = 0;
    let width = 0;
    let stations = 0;
    for (let seed = 1; seed <= regions; seed++) {
      const trends = trendsOf(normals(1000 + seed));
      const { spans } = certaintyOf(rank(invented(seed, trends)));
      for (const { code, rankLow, rankHigh } of spans) {
        const trend = trends[Number(code.slice(1))];
        const place = 1 + trends.filter((other) => other < trend).length;
        held += Number(rankLow <= place && place <= rankHigh);
        width += (rankHigh - rankLow + 1) / trends.length;
        stations += 1;
      }
    }
    return { held: held / stations, width: width / stations };
  }

  // 12 regions of 30 stations; the share of one region varies by about 0.08, so the mean by 0.025
  test('hold the true place in about 90 of 100 cases, for a true spread of 6 % per decade', () => {
    const { held, width } = tried(12, (normal) => Array.from({ length: 30 }, () => 6 * normal()));
    expect(held).toBeGreaterThan(0.83);
    expect(held).toBeLessThan(0.97);
    expect(width).toBeLessThan(0.75);
  }, 30_000);

  test('are nearly the whole ranking where no trend differs', () => {
    const { width } = tried(12, () => constant(30, -3));
    expect(width).toBeGreaterThan(0.8);
  }, 30_000);

  // the mean of such a river lies far above its median: replicates about the median would have means of nearly nothing
  test('are not blurred by one river that is nearly dry in most years', () => {
    const normal = normals(9);
    const fitful = station('S12', { first: 1980, values: Array.from({ length: 40 }, () => Math.exp(2 * normal())) });
    const [steep, ...level] = invented(7, [-20, ...constant(11, 0)]);
    const { spans, toldApart } = certaintyOf(rank([steep, ...level, fitful]));
    expect(toldApart).toBe(true);
    const span = spans.find(({ code }) => code === 'S00');
    expect(span?.rankLow).toBe(1);
    expect(span?.rankHigh).toBeLessThanOrEqual(4);
  });
});

describe('certainty', () => {
  const stations = invented(5, [-20, -10, -5, 0, 0, 0, 5, 10, 0, -3, -8, 4]);

  test('is the same however the stations are shared out, and in whatever order they come', () => {
    const whole = certaintyOf(rank(stations));
    expect(certaintyOf(rank(stations), { parts: 5 })).toEqual(whole);
    expect(certaintyOf(rank([...stations].reverse()))).toEqual(whole);
  });

  test('holds each place in its span, and chances that add up to k', () => {
    const ranking = rank(stations);
    const certainty = certaintyOf(ranking);
    expect(certainty).toMatchObject({ replicates: 200, toldApart: true });
    expect(certainty.trueSpread).toBeGreaterThan(2);
    expect(certainty.spans.map(({ code }) => code)).toEqual(ranking.rows.map(({ code }) => code));
    for (const { rankLow, rankHigh, amongSteepest } of certainty.spans) {
      expect(rankLow).toBeLessThanOrEqual(rankHigh);
      expect(amongSteepest).toHaveLength(12);
      expect(amongSteepest.every((share, k) => k === 0 || share >= amongSteepest[k - 1])).toBe(true);
    }
    const sum = certainty.spans.reduce((total, span) => total + chanceAmong(certainty, span, 3)!, 0);
    expect(sum).toBeCloseTo(3, 9);
    expect(chanceAmong(certainty, certainty.spans[11], 40)).toBe(1);
    const [steepest] = withCertainty(ranking, certainty, 2).rows;
    const [span] = certainty.spans;
    expect(steepest).toMatchObject({ code: span.code, rankLow: span.rankLow, steepestK: 2 });
    expect(steepest.amongSteepest).toBe(span.amongSteepest[1]);
    expect(() => withCertainty(ranking, certainty, 51)).toThrow('withCertainty: k must be a whole number from 1 to 50');
  });

  test('follows what is ranked by: the same order of spans by tau and by change per area', () => {
    for (const rankBy of ['specific-change', 'kendall-tau'] as const) {
      const { spans } = certaintyOf(rank(stations, { rankBy }));
      expect(spans).toHaveLength(12);
      expect(spans[0].rankLow).toBe(1);
      expect(spans[0].rankHigh).toBeLessThan(8);
      expect(spans[11].rankHigh).toBe(12);
    }
  });

  test('is that of minus the index where more of it is drier', () => {
    const random = seeded(3);
    const days = (rise: number) => Array.from({ length: 30 }, (_, i) => Math.round(20 + rise * i + 8 * random()));
    const drier = [2, 0, -0.5].map((rise, i) =>
      station(`Z${i}`, { first: 1980, values: constant(30), zeroDays: days(rise) }),
    );
    const ranking = rank(drier, { index: 'zero-flow-days' });
    expect(ranking.rows[0].code).toBe('Z0');
    const { spans, detectable } = certaintyOf(ranking);
    expect(spans[0]).toMatchObject({ code: 'Z0', rankLow: 1, rankHigh: 1 });
    // days have no percentage
    expect(detectable[0].percentPerDecade).toBeNull();
    expect(detectable[0].perDecade).toBeGreaterThan(0);
  });

  test('leaves out who has no ranking figure, and places the others among themselves', () => {
    const withoutArea = { ...stations[0], station: facts('S00', { areaKm2: null }) };
    const ranking = rank([withoutArea, ...stations.slice(1)], { rankBy: 'specific-change' });
    const certainty = certaintyOf(ranking);
    expect(certainty.spans).toHaveLength(11);
    expect(certainty.spans.some(({ code }) => code === 'S00')).toBe(false);
    expect(Math.max(...certainty.spans.map(({ rankHigh }) => rankHigh))).toBe(11);
    expect(certainty.detectable.find(({ code }) => code === 'S00')?.perDecade).toBeGreaterThan(0);
    const row = withCertainty(ranking, certainty).rows.find(({ code }) => code === 'S00');
    expect(row).toMatchObject({ rankLow: null, rankHigh: null, steepestK: null, amongSteepest: null });
  });

  test('gives drying stations a detectable trend in days and no span', () => {
    const random = seeded(9);
    const dry = station('D1', {
      first: 1980,
      values: Array.from({ length: 40 }, (_, i) => (i % 2 === 0 ? 0 : 0.5)),
      zeroDays: Array.from({ length: 40 }, () => Math.round(60 * random())),
    });
    const { spans, detectable } = certaintyOf(rank([...stations, dry]));
    expect(spans.some(({ code }) => code === 'D1')).toBe(false);
    const days = detectable.find(({ code }) => code === 'D1');
    expect(days?.percentPerDecade).toBeNull();
    expect(days?.perDecade).toBeGreaterThan(1);
  });

  test('gives no detectable trend to a river that is dry in a few years only', () => {
    const days = constant(40, 0).map((zero, i) => (i % 9 === 4 ? 3 + (i % 5) : zero));
    const often = days.map((value, i) => (i % 2 === 0 ? 10 + ((i * 7) % 23) : value));
    const few = station('F1', { first: 1980, values: constant(40, 0.5), zeroDays: days });
    const many = station('F2', { first: 1980, values: constant(40, 0.5), zeroDays: often });
    const { detectable } = certaintyOf(rank([few, many], { index: 'zero-flow-days' }));
    expect(detectable.find(({ code }) => code === 'F1')?.perDecade).toBeNull();
    expect(detectable.find(({ code }) => code === 'F2')?.perDecade).toBeGreaterThan(1);
  });

  test('answers for stations that are all alike, for two, for one and for none', () => {
    const level = [1, 2, 3].map((i) => station(`L${i}`, { first: 1980, values: constant(30, i) }));
    expect(certaintyOf(rank(level))).toMatchObject({ toldApart: false, trueSpread: 0 });
    expect(certaintyOf(rank(level)).detectable.map(({ perDecade }) => perDecade)).toEqual([null, null, null]);
    expect(certaintyOf(rank(level)).spans.map(({ rankLow, rankHigh }) => [rankLow, rankHigh])).toEqual(
      constant(3).map(() => [1, 3]),
    );
    expect(certaintyOf(rank(stations.slice(0, 2))).spans).toHaveLength(2);
    const alone = certaintyOf(rank(stations.slice(0, 1)));
    expect(alone.spans).toEqual([{ code: 'S00', rankLow: 1, rankHigh: 1, amongSteepest: [1] }]);
    expect(alone.detectable).toHaveLength(1);
    expect(certaintyOf(rank([]))).toEqual({
      ...{ replicates: 200, toldApart: true, trueSpread: 0, spans: [], detectable: [] },
    });
  });

  test('has no span for a station without three pairs of consecutive years', () => {
    const every2nd = Array.from({ length: 50 }, (_, i) => (i % 2 === 0 ? 100 + i + (i % 7) : Number.NaN));
    const sparse = { station: facts('E1'), minima: annualMinima({ first: 1970, values: every2nd }) };
    const { spans, detectable } = certaintyOf(rank([...stations, sparse], { minCoverage: 0.4 }));
    expect(spans).toHaveLength(12);
    expect(detectable.find(({ code }) => code === 'E1')).toMatchObject({ perDecade: null, percentPerDecade: null });
  });
});

describe('the detectable trend', () => {
  test('is found in four of five records like this one, by the test that the ranking runs', () => {
    for (const serialCorrection of ['none', 'ar1-regional'] as const) {
      const ranking = rank(invented(8, constant(20, 0)), { serialCorrection });
      const { detectable } = certaintyOf(ranking);
      const percent = detectable.reduce((sum, each) => sum + each.percentPerDecade!, 0) / detectable.length;
      const factor = ranking.rows.reduce((sum, { serialFactor }) => sum + serialFactor!, 0) / ranking.rows.length;
      let found = 0;
      for (let seed = 100; seed < 120; seed++) {
        for (const { minima } of invented(seed, constant(20, percent))) {
          const { p, s } = mannKendall(minima.minimum, { varianceFactor: factor });
          found += Number(p < 0.1 && s > 0);
        }
      }
      expect(found / 400).toBeGreaterThan(0.7);
      expect(found / 400).toBeLessThan(0.9);
    }
  }, 30_000);

  test('is there under every serial correction, and grows with the factor', () => {
    const values = (correction: Basis['serialCorrection']) =>
      certaintyOf(rank(invented(8, constant(12, 0)), { serialCorrection: correction })).detectable.map(
        ({ perDecade }) => perDecade!,
      );
    const plain = values('none');
    const regional = values('ar1-regional');
    expect(regional.every((value, i) => value >= plain[i])).toBe(true);
    for (const correction of ['ar1', 'all-lags', 'pre-whitened', 'block-bootstrap'] as const) {
      expect(values(correction).every((value) => value > 0 && Number.isFinite(value))).toBe(true);
    }
  });

  test('is none where the test can reject nothing', () => {
    const few = [1, 2, 3].map((i) => station(`F${i}`, { first: 2000, values: [3 * i, 1, 4, 1, 5] }));
    const { detectable } = certaintyOf(rank(few, { minYears: 5, alpha: 0.001 }));
    expect(detectable.map(({ perDecade }) => perDecade)).toEqual([null, null, null]);
  });
});

test('stations ranked by tau have spans also where a replicate holds no year that differs', () => {
  // regulated flows that were undercut in two years of thirty: many draws of thirty years hold neither
  const stations = [4, 9, 14].map((year, i) => {
    const values = constant(30);
    values[year] = 0.8;
    values[29 - i] = 0.7;
    return station(`HELD${i}`, { first: 1980, values });
  });
  const { spans } = certaintyOf(rank(stations, { rankBy: 'kendall-tau', serialCorrection: 'ar1' }));
  expect(spans.map(({ code }) => code).sort()).toEqual(['HELD0', 'HELD1', 'HELD2']);
});
