import { expect, test } from 'vitest';
import { rankRegion } from '../../../lib/region/rank-stations.ts';
import { addCharts, regionSpan, regionStartEnd } from '../../../lib/region/region-start-end.ts';
import { startEnd } from '../../../lib/region/start-end.ts';
import { basisOf, constant, station, YEAR_START } from './region-fixtures.ts';

function wandering(n: number, seed: number, slope: number): number[] {
  let state = seed;
  return Array.from({ length: n }, (_, i) => {
    state = (state * 1103515245 + 12345) % 2147483648;
    return Math.round(1000 * (2 + slope * i + state / 2147483648)) / 1000;
  });
}

function region(keys: Parameters<typeof basisOf>[0] = {}) {
  const stations = Array.from({ length: 6 }, (_, i) => {
    const values = wandering(36, 31 * (i + 1), [-0.03, 0.02, 0][i % 3]);
    if (i === 1) values.fill(Number.NaN, 0, 4);
    if (i === 4) values[20] = Number.NaN;
    return station(`S${i}`, { first: 1980, values });
  });
  const basis = basisOf({ serialCorrection: 'ar1', period: [1980, 2015], minCoverage: 0.5, ...keys });
  const { rows, basis: resolved } = rankRegion(stations, basis, YEAR_START);
  return { rows: rows.filter(({ rank }) => rank !== null), basis: resolved };
}

test.each(['ar1', 'pre-whitened'] as const)(
  'regionStartEnd: each cell counts what the stations’ own charts say there, under %s',
  (serialCorrection) => {
    const { rows, basis } = region({ serialCorrection });
    expect(rows.length).toBe(6);
    const chart = regionStartEnd(rows, basis, regionSpan(rows, basis));
    const own = rows.map((row) => startEnd(row, basis));
    let [falling, rising] = [0, 0];
    chart.starts.forEach((start, i) => {
      chart.ends.forEach((end, j) => {
        const cell = i * chart.ends.length + j;
        const seen = own.flatMap(({ starts, ends, z, p }) => {
          const at = starts.indexOf(start) * ends.length + ends.indexOf(end);
          const isThere = starts.includes(start) && ends.includes(end) && !Number.isNaN(z[at]);
          return isThere ? [{ z: z[at], p: p[at] }] : [];
        });
        expect(chart.stations[cell]).toBe(seen.length);
        expect(chart.falling[cell]).toBe(seen.filter(({ z, p }) => z < 0 && p < basis.alpha).length);
        expect(chart.rising[cell]).toBe(seen.filter(({ z, p }) => z > 0 && p < basis.alpha).length);
        falling += chart.falling[cell];
        rising += chart.rising[cell];
      });
    });
    expect(falling).toBeGreaterThan(0);
    expect(rising).toBeGreaterThan(0);
  },
);

test('regionStartEnd: the whole period counts negative S as the rows’ tau says', () => {
  const { rows, basis } = region();
  const chart = regionStartEnd(rows, basis, [1980, 2015]);
  expect(chart.negative[chart.ends.length - 1]).toBe(rows.filter(({ tau }) => tau! < 0).length);
});

test('regionStartEnd: parts of a region add up to it, however it is shared out', () => {
  const { rows, basis } = region();
  const whole = regionStartEnd(rows, basis, [1980, 2015]);
  const parts = [rows.slice(0, 1), rows.slice(1, 5), rows.slice(5)].map((part) =>
    regionStartEnd(part, basis, [1980, 2015]),
  );
  expect(addCharts(parts)).toEqual(whole);
});

test('regionSpan: without a common period from the first to the last usable year of any station', () => {
  const { rows, basis } = region({ period: null });
  expect(regionSpan(rows, basis)).toEqual([1980, 2015]);
  const chart = regionStartEnd(rows, basis, [1980, 2015]);
  // the station whose record begins in 1984 is counted where it has its 15 years: from 1980 to 1998 at the earliest
  const at = (end: number) => chart.stations[chart.ends.indexOf(end)];
  expect([at(1997), at(1998)]).toEqual([5, 6]);
});

test.each([
  ['no station', [], [1980, 2015]],
  ['a period of 14 years', [], [1980, 1993]],
] as const)('regionStartEnd: %s has no counts', (_, rows, span) => {
  const chart = regionStartEnd(rows, basisOf(), span);
  expect([...chart.stations].every((count) => count === 0)).toBe(true);
  expect(chart.stations.length).toBe(chart.starts.length * chart.ends.length);
});

test('regionStartEnd: no station and no common period has no years', () => {
  const chart = regionStartEnd([], basisOf(), regionSpan([], { period: null }));
  expect(chart).toMatchObject({ starts: [], ends: [] });
});

test('regionStartEnd: all-equal values are neither negative nor falling nor rising', () => {
  const { rows, basis } = rankRegion(
    [station('E', { first: 1980, values: constant(30) })],
    basisOf({ period: [1980, 2009] }),
    YEAR_START,
  );
  const chart = regionStartEnd(rows, basis, [1980, 2009]);
  const whole = chart.ends.length - 1;
  const { stations, negative, falling, rising } = chart;
  expect([stations[whole], negative[whole], falling[whole], rising[whole]]).toEqual([1, 0, 0, 0]);
});

test('regionStartEnd: refuses alpha 0 and 1, and infinite values, by name', () => {
  const { rows, basis } = region();
  for (const alpha of [0, 1, Number.NaN]) {
    expect(() => regionStartEnd(rows, { ...basis, alpha }, [1980, 2015])).toThrow('regionStartEnd: alpha must lie');
  }
  const infinite = { ...rows[0], values: rows[0].values.with(5, Number.POSITIVE_INFINITY) };
  expect(() => regionStartEnd([infinite], basis, [1980, 2015])).toThrow('windowScores: x[5]');
});
