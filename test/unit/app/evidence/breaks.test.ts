import { expect, test } from 'vitest';
import { breaksFromText, breaksToText } from '@/app/regions/[region]/evidence/_breaks/break-list';
import { breaksSentence, summaryWords } from '@/app/regions/[region]/evidence/_breaks/break-words';

const DAM = { label: 'dam', tested: 33, lower: 12, higher: 2, medianPercent: -14.2 };

test('breaksFromText: years rise, stand once, and what is no year is left out', () => {
  expect(breaksFromText('2005,1990,1990,x,90')).toEqual([1990, 2005]);
  expect(breaksFromText('')).toEqual([]);
  expect(breaksFromText(null)).toEqual([]);
  expect(breaksFromText('1951,1961,1971,1981,1991,2001')).toEqual([1951, 1961, 1971, 1981, 1991]);
});

test('breaksToText: the inverse, and null for none', () => {
  expect(breaksToText([2005, 1990])).toBe('1990,2005');
  expect(breaksToText([])).toBeNull();
});

test('summaryWords: several comparisons, one, and none', () => {
  expect(summaryWords(DAM)).toBe(
    'Dam: of 33 comparisons 12 are lower after and 2 higher, allowing for false discoveries; the median change is −14\u00a0%.',
  );
  expect(summaryWords({ ...DAM, tested: 1, lower: 0, higher: 1, medianPercent: 96 })).toBe(
    'Dam: at the one station compared it is higher after, allowing for false discoveries; the change is +96\u00a0%.',
  );
  expect(summaryWords({ ...DAM, lower: 0, higher: 0, medianPercent: null })).toBe(
    'Dam: of 33 comparisons none is lower after and none higher, allowing for false discoveries.',
  );
  expect(summaryWords({ ...DAM, tested: 0 })).toBe('Dam: no ranked station has usable years on both sides.');
});

test('breaksSentence: two kinds are told singly, more are counted together, none is null', () => {
  const one = { ...DAM, label: 'weir changed', tested: 1, lower: 0, higher: 0 };
  expect(breaksSentence({ summary: [DAM, one] })).toBe(`${summaryWords(DAM)} ${summaryWords(one)}`);
  expect(breaksSentence({ summary: [DAM, one, { ...one, label: 'abstraction', tested: 2, lower: 1 }] })).toBe(
    'Across 36 comparisons with usable years on both sides (dam 33, weir changed 1, abstraction 2) 13 are lower after and 2 higher, allowing for false discoveries.',
  );
  expect(breaksSentence({ summary: [{ ...DAM, tested: 0 }] })).toBeNull();
  expect(breaksSentence({ summary: [] })).toBeNull();
});
