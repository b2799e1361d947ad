import { expect, test } from 'vitest';
import { besideRanking, headline } from '@/app/regions/[region]/headline';
import { mapRow } from './map-row-builder.ts';

const falling = mapRow({ rank: 1, trend: 'falling' });
const rising = mapRow({ rank: 2, trend: 'rising' });
const chance = mapRow({ rank: 3, trend: 'none' });
const drying = mapRow({ drying: true, trend: 'falling' });
const unranked = mapRow({});

test('headline counts ranked stations only, in words that agree', () => {
  expect(headline([falling, falling, rising, chance, drying, unranked], 0.1)).toBe(
    '2 of 4 ranked stations fall and 1 rises, with at most 10\u00a0% false discoveries expected.',
  );
  expect(headline([falling, chance], 0.05)).toBe(
    '1 of 2 ranked stations falls and none rises, with at most 5\u00a0% false discoveries expected.',
  );
  expect(headline([rising, chance], 0.005)).toBe(
    'None of 2 ranked stations falls and 1 rises, with at most 0.5\u00a0% false discoveries expected.',
  );
});

test('headline says that no trend is not no change', () => {
  expect(headline([chance, chance], 0.1)).toContain('No significant trend is not no change.');
});

test('headline speaks of a lone station as one', () => {
  expect(headline([chance, unranked], 0.1)).toMatch(/^The one ranked station neither falls nor rises, with at most 10/);
  expect(headline([rising], 0.1)).toMatch(/^The one ranked station rises/);
});

test('headline groups thousands', () => {
  expect(headline([...Array(1200).fill(chance), falling], 0.1)).toMatch(/^1 of 1,201 ranked stations falls/);
});

test('headline says when nothing can be ranked', () => {
  expect(headline([unranked, drying], 0.1)).toBe('No station can be ranked on these terms.');
});

test('besideRanking names what the ranking leaves out', () => {
  expect(besideRanking([falling])).toBe('');
  expect(besideRanking([falling, drying])).toBe('1 station is listed as drying.');
  expect(besideRanking([drying, drying, unranked])).toBe('2 stations are listed as drying and 1 is not ranked.');
  expect(besideRanking([unranked])).toBe('1 station is not ranked.');
});

test('headline says in the words of the index what falling and rising are', () => {
  expect(headline([falling, falling, rising], 0.1, 'zero-flow-days')).toMatch(
    /^2 of 3 ranked stations are dry for longer and 1 is dry for shorter, with/,
  );
  expect(headline([chance, chance], 0.1, 'zero-flow-days')).toMatch(
    /^None of 2 ranked stations is dry for longer or for shorter, with/,
  );
  expect(headline([falling, rising, rising], 0.1, 'minimum-date')).toMatch(
    /^1 of 3 ranked stations has its low earlier and 2 have them later, with/,
  );
  expect(headline([falling, falling, chance], 0.1, 'deficit')).toMatch(
    /^2 of 3 ranked stations have larger deficits and none has smaller ones, with/,
  );
  expect(headline([falling, chance], 0.1, 'bfi')).toMatch(/^1 of 2 ranked stations falls and none rises, with/);
});
