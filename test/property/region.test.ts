import fc from 'fast-check';
import { expect, test } from 'vitest';
import { INDICES, parseBasis } from '../../lib/basis.ts';
import { commonPeriod } from '../../lib/region/common-period.ts';
import { standingOf } from '../../lib/region/eligibility.ts';
import { rankRegion } from '../../lib/region/rank-stations.ts';
import type { StationMinima } from '../../lib/region/ranking-types.ts';
import { usedYears } from '../../lib/region/used-years.ts';
import { benjaminiHochberg } from '../../lib/statistics/false-discovery.ts';
import { annualMinima, station, YEAR_START } from '../unit/region/region-fixtures.ts';

/** Few distinct values make ties; zeros make drying stations; NaN makes unusable years. */
const minimum = fc.oneof(
  { weight: 12, arbitrary: fc.integer({ min: 1, max: 60 }).map((tenths) => tenths / 10) },
  { weight: 2, arbitrary: fc.constant(0) },
  { weight: 1, arbitrary: fc.constant(Number.NaN) },
);
const spec = fc
  .record({ first: fc.integer({ min: 1990, max: 1996 }), values: fc.array(minimum, { maxLength: 18 }) })
  .chain(({ first, values }) =>
    fc
      .array(fc.integer({ min: 0, max: 90 }), { minLength: values.length, maxLength: values.length })
      .map((zeroDays) => ({ first, values, zeroDays })),
  );
const region = fc
  .array(fc.record({ spec, areaKm2: fc.option(fc.integer({ min: 1, max: 500 })) }), { maxLength: 14 })
  .map((stations) =>
    stations.map(({ spec, areaKm2 }, i) => ({
      ...station(`s${String(i).padStart(2, '0')}`, spec, { areaKm2 }),
      // for the indices that come from the record: any figures will do, some of them missing
      figures: Float64Array.from(spec.values, (value, year) => (year % 7 === 3 ? Number.NaN : 10 * value)),
    })),
  );
const basis = fc
  .record({
    period: fc.constantFrom<'common' | null | [number, number]>('common', null, [1992, 2005]),
    minYears: fc.integer({ min: 3, max: 8 }),
    minCoverage: fc.constantFrom(0, 0.5, 0.8, 1),
    rankBy: fc.constantFrom('percent-per-decade', 'specific-change', 'kendall-tau'),
    serialCorrection: fc.constantFrom('ar1-regional', 'ar1', 'none'),
    index: fc.constantFrom('minimum', 'minimum', ...INDICES),
  })
  .map((keys) => parseBasis(keys));
const rank = (stations: StationMinima[], keys: ReturnType<typeof parseBasis>) => rankRegion(stations, keys, YEAR_START);

test('rankRegion does not depend on the order of its input', () => {
  fc.assert(
    fc.property(region, basis, (stations, keys) => {
      const { rows, ...rest } = rank(stations, keys);
      const turned = rank([...stations].reverse(), keys);
      expect(turned.basis).toEqual(rest.basis);
      expect(turned.counts).toEqual(rest.counts);
      expect(turned.warnings).toEqual(rest.warnings);
      // sums over the region are taken in another order, so the last digits may differ
      expect(turned.rows.map(({ code, rank, trend, note }) => [code, rank, trend, note])).toEqual(
        rows.map(({ code, rank, trend, note }) => [code, rank, trend, note]),
      );
      rows.forEach((row, i) => {
        if (row.p === null) return;
        expect(turned.rows[i].p).toBeCloseTo(row.p, 10);
        expect(turned.rows[i].pAdjusted).toBeCloseTo(row.pAdjusted!, 10);
      });
    }),
  );
});

test('rankRegion never loses a station: each has one row, with a place, or a reason', () => {
  fc.assert(
    fc.property(region, basis, (stations, keys) => {
      const { rows, counts } = rank(stations, keys);
      expect(rows.map(({ code }) => code).sort()).toEqual(stations.map((each) => each.station.code));
      for (const row of rows) expect(row.rank === null).toBe(row.unrankedReason !== null);
      expect(counts.ranked + counts.drying + counts.unranked).toBe(stations.length);
      // ranked first, then drying, then the others
      const kinds = rows.map((row) => (row.rank !== null ? 0 : row.drying ? 1 : 2));
      expect(kinds).toEqual([...kinds].sort());
    }),
  );
});

test('rankRegion gives places without holes: each row stands at its own number or shares the one before', () => {
  fc.assert(
    fc.property(region, basis, (stations, keys) => {
      const ranked = rank(stations, keys).rows.filter((row) => row.rank !== null);
      ranked.forEach((row, i) => {
        if (row.rank !== i + 1) expect(row.rank).toBe(ranked[i - 1].rank);
        if (i > 0) expect(row.rank!).toBeGreaterThanOrEqual(ranked[i - 1].rank!);
      });
    }),
  );
});

test('rankRegion adjusts p over all ranked stations, and over all drying ones, whatever is shown of them', () => {
  fc.assert(
    fc.property(region, basis, (stations, keys) => {
      const { rows } = rank(stations, keys);
      for (const family of [rows.filter(({ rank }) => rank !== null), rows.filter(({ drying }) => drying)]) {
        expect(family.map(({ pAdjusted }) => pAdjusted)).toEqual([...benjaminiHochberg(family.map(({ p }) => p!))]);
      }
    }),
  );
});

test('rankRegion: units of the flows change no percentage, test or place', () => {
  fc.assert(
    fc.property(region, basis, (stations, keys) => {
      // by a power of two, so that no rounding comes in
      const doubled = stations.map(({ minima, figures, ...rest }) => ({
        ...rest,
        minima: {
          ...minima,
          minimum: minima.minimum.map((value) => value * 2),
          meanFlow: minima.meanFlow.map((value) => value * 2),
        },
        figures: figures.map((value) => value * 2),
      }));
      const pick = ({ rows }: ReturnType<typeof rank>) =>
        rows.map(({ code, rank, tau, percentPerDecade }) => [code, rank, tau, percentPerDecade]);
      // ar1 rounds rests to nine decimals; without it every figure is the same
      const plain = { ...keys, serialCorrection: 'none' as const };
      expect(pick(rank(doubled, plain))).toEqual(pick(rank(stations, plain)));
    }),
  );
});

test('commonPeriod is the best of all windows, counted one by one', () => {
  fc.assert(
    fc.property(
      region,
      fc.integer({ min: 3, max: 12 }),
      fc.constantFrom(0, 0.5, 0.8, 1),
      (stations, minYears, share) => {
        const rule = { minYears, minCoverage: share };
        const all = stations.map(({ minima }) => minima);
        const usable = all.flatMap(({ years, usable }) => [...years].filter((_, i) => usable[i] === 1));
        const found = commonPeriod(all, rule);
        const [first, last] = [Math.min(...usable), Math.max(...usable)];
        if (!usable.length || last - first + 1 < minYears) {
          expect(found).toEqual({ period: null, ranked: 0 });
          return;
        }
        const windows: { period: [number, number]; ranked: number; drying: number }[] = [];
        for (let from = first; from <= last; from++) {
          for (let to = from + minYears - 1; to <= last; to++) {
            const kinds = all.map((annual) => standingOf(usedYears(annual, [from, to]), [from, to], rule).kind);
            const count = (kind: string) => kinds.filter((each) => each === kind).length;
            windows.push({ period: [from, to], ranked: count('ranked'), drying: count('drying') });
          }
        }
        const size = ({ period: [from, to], ranked }: (typeof windows)[number]) => ranked * (to - from + 1);
        const sizeDrying = ({ period: [from, to], drying }: (typeof windows)[number]) => drying * (to - from + 1);
        windows.sort(
          (a, b) =>
            size(b) - size(a) ||
            (size(a) === 0 ? sizeDrying(b) - sizeDrying(a) : 0) ||
            b.period[1] - a.period[1] ||
            a.period[0] - b.period[0],
        );
        expect(found).toEqual({ period: windows[0].period, ranked: windows[0].ranked });
      },
    ),
    { numRuns: 60 },
  );
});

test('standingOf: one more usable year never turns a ranked station away, but for its zeros', () => {
  fc.assert(
    fc.property(spec, fc.nat(), fc.integer({ min: 3, max: 8 }), ({ first, values }, place, minYears) => {
      fc.pre(values.some(Number.isNaN));
      const holes = values.map((value, i) => (Number.isNaN(value) ? i : -1)).filter((i) => i >= 0);
      const filled = values.with(holes[place % holes.length], 1);
      const period: [number, number] = [first, first + values.length - 1];
      const kind = (each: number[]) =>
        standingOf(usedYears(annualMinima({ first, values: each }), period), period, { minYears, minCoverage: 0.8 })
          .kind;
      if (kind(values) === 'ranked') expect(kind(filled)).toBe('ranked');
    }),
  );
});
