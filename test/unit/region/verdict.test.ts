import { expect, test } from 'vitest';
import { verdict } from '../../../lib/region/verdict.ts';
import { rankedRow, resolvedBasis } from './region-fixtures.ts';

const basis = resolvedBasis({ period: [1985, 2024] });

test('verdict of a falling station', () => {
  expect(verdict(rankedRow(), basis)).toBe(
    'Falling: the 7-day minimum lost 6.2 % of its mean per decade (95 % interval −9.1 to −2.8), 1985–2024, 38 usable years, adjusted p 0.003.',
  );
});

test('verdict of a rising station over a season', () => {
  const row = rankedRow({
    trend: 'rising',
    percentPerDecade: 128.4,
    valueSlopeLow: 0.05,
    valueSlopeHigh: 4.02,
    pAdjusted: 0.00042,
  });
  expect(verdict(row, { ...basis, days: 30, season: [6, 10] })).toBe(
    'Rising: the June–October 30-day minimum gained 128 % of its mean per decade (95 % interval +2.5 to +201), 1985–2024, 38 usable years, adjusted p below 0.001.',
  );
});

test('verdict without significance gives the figures and does not call it no change', () => {
  const row = rankedRow({ trend: 'none', percentPerDecade: -2.1, valueSlopeHigh: 0.034, pAdjusted: 0.31 });
  expect(verdict(row, basis)).toBe(
    'No significant trend: the 7-day minimum changed by −2.1 % of its mean per decade (95 % interval −9.1 to +1.7), 1985–2024, 38 usable years, adjusted p 0.31. This does not show that nothing changed.',
  );
  expect(verdict({ ...row, percentPerDecade: 0, valueSlopeLow: 0 }, basis)).toContain(
    'changed by 0 % of its mean per decade (95 % interval 0 to +1.7)',
  );
});

test('verdict without an interval says why', () => {
  expect(verdict(rankedRow({ valueSlopeLow: null, valueSlopeHigh: null }), basis)).toContain(
    '(too few years for a 95 % interval)',
  );
});

test('verdict without a percentage speaks in m³/s', () => {
  expect(verdict(rankedRow({ percentPerDecade: null, meanValue: -1 }), basis)).toContain(
    'lost 0.12 m³/s per decade (95 % interval −0.18 to −0.056)',
  );
});

test('verdict of drying stations speaks of zero-flow days', () => {
  const dry = rankedRow({
    rank: null,
    drying: true,
    unrankedReason: '14 of 38 minima are zero, a third or more: listed under Drying, by zero-flow days',
    zeroFlowYears: 14,
    percentPerDecade: null,
    slopePerDecade: null,
    zeroDaysPerDecade: 4.1,
    zeroDaysLow: 1.2,
    zeroDaysHigh: 7.04,
    trendOf: 'zero-days',
  });
  const figures =
    'zero-flow days changed by +4.1 a year per decade (95 % interval +1.2 to +7), 1985–2024, 38 usable years, adjusted p 0.003; 14 of 38 minima are zero, so it is not ranked by slope.';
  expect(verdict(dry, basis)).toBe(`Drying for longer: ${figures}`);
  expect(verdict({ ...dry, trend: 'none' }, basis)).toBe(`Often dry, without a significant trend: ${figures}`);
  expect(verdict({ ...dry, trend: 'rising', zeroDaysPerDecade: -4.1 }, basis)).toMatch(/^Drying for shorter: .*−4\.1/);
});

test('verdict of an unranked station is its reason', () => {
  const row = rankedRow({ rank: null, trend: null, unrankedReason: '12 usable years, 20 needed' });
  expect(verdict(row, basis)).toBe('Not ranked: 12 usable years, 20 needed.');
});

test.each([
  ['q95', 'Falling: the annual Q95 lost 6.2 % of its mean per decade (95 % interval −9.1 to −2.8)'],
  ['mean-flow', 'Falling: the annual mean flow lost 6.2 % of its mean per decade'],
  ['bfi', 'Falling: the baseflow index lost 6.2 % of its mean per decade'],
] as const)('verdict of a falling %s names it', (index, words) => {
  expect(verdict(rankedRow({ trendOf: index }), { ...basis, index })).toContain(words);
});

test('verdict of more zero-flow days is drying for longer, in days, although their slope is positive', () => {
  const row = rankedRow({
    trendOf: 'zero-flow-days',
    percentPerDecade: null,
    valueSlope: 3.2,
    valueSlopeLow: 0.9,
    valueSlopeHigh: 5.6,
  });
  const season: [number, number] = [5, 10];
  expect(verdict(row, { ...basis, index: 'zero-flow-days', season })).toBe(
    'Drying for longer: the number of May–October zero-flow days gained 3.2 days per decade (95 % interval +0.9 to +5.6), 1985–2024, 38 usable years, adjusted p 0.003.',
  );
});

test('verdict of dates says earlier and later, in days', () => {
  const row = rankedRow({ trendOf: 'minimum-date', percentPerDecade: null, valueSlope: -5.2 });
  const dates = { ...basis, index: 'minimum-date' } as const;
  expect(verdict(row, dates)).toContain('Earlier: the date of the 7-day minimum came 5.2 days earlier per decade (');
  expect(verdict({ ...row, trend: 'rising', valueSlope: 8 }, dates)).toContain(
    'Later: the date of the 7-day minimum came 8 days later per decade (',
  );
});

test('verdict of growing deficits calls them larger, with a gain in percent of their mean', () => {
  const row = rankedRow({ trendOf: 'deficit', percentPerDecade: 14, meanValue: 2e6, valueSlopeLow: 4e4 });
  expect(verdict(row, { ...basis, index: 'deficit' })).toContain(
    'Larger deficits: the deficit volume below Q90 gained 14 % of its mean per decade (95 % interval +2 to ',
  );
});
