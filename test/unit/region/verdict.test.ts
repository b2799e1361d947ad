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
    slopeLow: 0.05,
    slopeHigh: 4.02,
    pAdjusted: 0.00042,
  });
  expect(verdict(row, { ...basis, days: 30, season: [6, 10] })).toBe(
    'Rising: the June–October 30-day minimum gained 128 % of its mean per decade (95 % interval +2.5 to +201), 1985–2024, 38 usable years, adjusted p below 0.001.',
  );
});

test('verdict without significance gives the figures and does not call it no change', () => {
  const row = rankedRow({ trend: 'none', percentPerDecade: -2.1, slopeHigh: 0.034, pAdjusted: 0.31 });
  expect(verdict(row, basis)).toBe(
    'No significant trend: the 7-day minimum changed by −2.1 % of its mean per decade (95 % interval −9.1 to +1.7), 1985–2024, 38 usable years, adjusted p 0.31. This does not show that nothing changed.',
  );
  expect(verdict({ ...row, percentPerDecade: 0, slopeLow: 0 }, basis)).toContain(
    'changed by 0 % of its mean per decade (95 % interval 0 to +1.7)',
  );
});

test('verdict without an interval says why', () => {
  expect(verdict(rankedRow({ slopeLow: null, slopeHigh: null }), basis)).toContain(
    '(too few years for a 95 % interval)',
  );
});

test('verdict without a percentage speaks in m³/s', () => {
  expect(verdict(rankedRow({ percentPerDecade: null, meanMinimum: -1 }), basis)).toContain(
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
