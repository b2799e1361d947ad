import { expect, test } from 'vitest';
import {
  area,
  count,
  fixed,
  flow,
  interval,
  MISSING,
  percent,
  percentPerDecade,
  pValue,
  range,
  shareText,
  signed,
  significant,
  specific,
} from '@/app/components/format';

test('fixed writes a true minus, groups thousands, and never a negative zero', () => {
  expect(fixed(-1234.56, 1)).toBe('−1,234.6');
  expect(fixed(999_999.5)).toBe('1,000,000');
  expect(fixed(999)).toBe('999');
  expect(fixed(1000)).toBe('1,000');
  expect(fixed(1234.5678, 4)).toBe('1,234.5678');
  expect(fixed(-0.04, 1)).toBe('0.0');
  expect(fixed(-0.06, 1)).toBe('−0.1');
});

test('shareText rounds neither a few of many to none nor most to all', () => {
  expect(shareText(0.004)).toBe('<\u00a01\u00a0%');
  expect(shareText(465 / 466)).toBe('>\u00a099\u00a0%');
  expect([0, 0.01, 0.37, 0.99, 1].map(shareText)).toEqual(['0', '1', '37', '99', '100'].map((n) => `${n}\u00a0%`));
});

test('a missing figure is a dash in every form, and 0 is not missing', () => {
  for (const write of [fixed, signed, significant, pValue, percent, percentPerDecade, shareText]) {
    expect(write(null)).toBe(MISSING);
    expect(write(Number.NaN)).toBe(MISSING);
    expect(write(0)).not.toBe(MISSING);
  }
  expect(flow(null, 'metric')).toBe(MISSING);
  expect(area(null, 'us')).toBe(MISSING);
  expect(specific(null, 'us')).toBe(MISSING);
  expect(interval(null, 1)).toBe(MISSING);
});

test('signed puts a plus before what is above zero as written', () => {
  expect(signed(2.34)).toBe('+2.3');
  expect(signed(-2.34)).toBe('−2.3');
  expect(signed(0.04)).toBe('0.0');
  expect(signed(0)).toBe('0.0');
});

test('significant keeps three figures at, below and above a power of ten', () => {
  expect(significant(0.012345)).toBe('0.0123');
  expect(significant(0.9996)).toBe('1.00');
  expect(significant(9.996)).toBe('10.0');
  expect(significant(99.96)).toBe('100');
  expect(significant(1234.5)).toBe('1,230');
  expect(significant(-1234.5)).toBe('−1,230');
  expect(significant(0)).toBe('0');
  expect(significant(1.234e-8)).toBe('1.23e−8');
});

test('range and interval never put a dash beside a minus', () => {
  expect(range(1985, 2024)).toBe('1985–2024');
  expect(interval(-9.12, -2.84)).toBe('−9.1 to −2.8');
  expect(interval(-1.2, 3.4)).toBe('−1.2 to +3.4');
});

test('pValue is never written as zero', () => {
  expect(pValue(0.00049)).toBe('<\u00a00.001');
  expect(pValue(0.001)).toBe('0.001');
  expect(pValue(0.0994)).toBe('0.099');
  expect(pValue(0.1)).toBe('0.10');
  expect(pValue(1)).toBe('1.00');
});

test('US units follow from the exact foot (0.3048 m) and mile (1,609.344 m)', () => {
  // 1 m³/s = 35.3147 ft³/s; 1 km² = 0.386102 mi²; 10.93319559 L/s/km² = 1 ft³/s/mi² (methods: normalisation by area)
  expect(flow(1, 'us')).toBe('35.3\u00a0ft³/s');
  expect(area(1000, 'us')).toBe('386\u00a0mi²');
  expect(specific(10.93319559, 'us')).toBe('1.00\u00a0ft³/s/mi²');
  expect(flow(1, 'metric')).toBe('1.00\u00a0m³/s');
});

test('count agrees in number', () => {
  expect(count(0, 'station')).toBe('0 stations');
  expect(count(1, 'station')).toBe('1 station');
  expect(count(2000, 'station')).toBe('2,000 stations');
});
