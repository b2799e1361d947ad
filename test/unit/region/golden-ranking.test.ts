/** Freezes every figure of a small invented region together with METHODS_VERSION, so that no number moves unnoticed.
 *
 *  When it fails because a figure is meant to move: raise METHODS_VERSION, say so in CHANGELOG.md, and write the figures
 *  of the new version with
 *      WRITE_GOLDEN=1 npx vitest run --project unit test/unit/region/golden-ranking.test.ts
 *  which never overwrites those of a version that is already there. */
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { METHODS_VERSION } from '../../../lib/region/methods-version.ts';
import { rankRegion } from '../../../lib/region/rank-stations.ts';
import type { Ranking } from '../../../lib/region/ranking-types.ts';
import { verdict } from '../../../lib/region/verdict.ts';
import { basisOf, station, YEAR_START } from './region-fixtures.ts';

const YEARS = 45;

/** Whole-number noise, the same on every machine. */
function inventedValues(seed: number, trend: number, level: number, memory: number): number[] {
  let state = seed;
  let carried = 0;
  return Array.from({ length: YEARS }, (_, year) => {
    state = (state * 1103515245 + 12345) % 2147483648;
    carried = memory * carried + (state / 2147483648 - 0.5);
    return Math.max(0, Math.round(1000 * (level + trend * year + 0.4 * level * carried)) / 1000);
  });
}

function inventedRegion() {
  const stations = Array.from({ length: 14 }, (_, i) => {
    const values = inventedValues(97 * (i + 1), [-0.02, 0, 0.01, -0.005][i % 4], 1 + i / 4, (i % 5) / 8);
    if (i === 3) values.fill(Number.NaN, 10, 25);
    if (i === 5) values.fill(Number.NaN, 0, 3);
    return station(
      `G${String(i + 1).padStart(2, '0')}`,
      { first: 1976, values },
      { areaKm2: i === 7 ? null : 50 * (i + 1) },
    );
  });
  for (let i = 0; i < 3; i++) {
    const dry = inventedValues(31 * (i + 1), 0, 0.4, 0.3).map((value) => (value < 0.41 ? 0 : value));
    const zeroDays = inventedValues(53 * (i + 1), 0.5 * i, 20, 0.2).map(Math.round);
    stations.push(station(`D${i + 1}`, { first: 1976, values: dry, zeroDays }));
  }
  // figures of an index that comes from the record, for the ranking by it
  return stations.map((each, i) => ({
    ...each,
    figures: Float64Array.from(inventedValues(71 * (i + 1), [-0.004, 0.003, 0][i % 3], 0.5, (i % 4) / 8)),
  }));
}

/** Ten digits: more than anybody reads, fewer than machines disagree in. */
const rounded = (value: unknown): unknown =>
  typeof value === 'number' && !Number.isInteger(value) ? Number(value.toPrecision(10)) : value;

function frozen() {
  const rankings = [
    basisOf(),
    basisOf({ rankBy: 'specific-change', serialCorrection: 'ar1', period: null }),
    basisOf({ rankBy: 'kendall-tau', serialCorrection: 'none', period: [1990, 2015] }),
    basisOf({ index: 'bfi', serialCorrection: 'pre-whitened' }),
    basisOf({ index: 'deficit', rankBy: 'specific-change', serialCorrection: 'all-lags' }),
    basisOf({ index: 'zero-flow-days', serialCorrection: 'block-bootstrap' }),
  ].map((basis) => rankRegion(inventedRegion(), basis, YEAR_START));
  const figures = rankings.map(({ rows, ...rest }: Ranking) => ({
    ...rest,
    rows: rows.map((row) => ({
      ...row,
      minima: row.minima.length,
      years: row.years.length,
      values: row.values.length,
      verdict: verdict(row, rest.basis),
    })),
  }));
  return JSON.parse(JSON.stringify({ methodsVersion: METHODS_VERSION, figures }, (_, value) => rounded(value)));
}

const file = new URL(`./golden-ranking-${METHODS_VERSION}.json`, import.meta.url);

test(`rankRegion gives the figures of METHODS_VERSION ${METHODS_VERSION}, to the tenth digit`, () => {
  if (process.env.WRITE_GOLDEN && !existsSync(file)) writeFileSync(file, `${JSON.stringify(frozen(), null, 1)}\n`);
  expect(existsSync(file), 'no figures are frozen for this version: see the top of this file').toBe(true);
  expect(frozen(), 'a figure moved: raise METHODS_VERSION, see the top of this file').toEqual(
    JSON.parse(readFileSync(file, 'utf8')),
  );
});

test('the frozen region shows what matters: falling, rising, level, drying, unranked, with and without an area', () => {
  const [first, own, short] = frozen().figures;
  expect(first.counts.falling).toBeGreaterThan(0);
  expect(first.counts.rising).toBeGreaterThan(0);
  expect(first.counts.falling + first.counts.rising).toBeLessThan(first.counts.ranked);
  expect(first.counts.drying).toBe(3);
  expect(first.counts.unranked).toBeGreaterThan(0);
  expect(first.rows.some((row: { serialFactor: number }) => row.serialFactor > 1)).toBe(true);
  expect(
    own.rows.some(
      (row: { rank: number | null; specificPerDecade: number | null }) =>
        row.rank !== null && row.specificPerDecade === null,
    ),
  ).toBe(true);
  expect(short.basis.period).toEqual([1990, 2015]);
});
