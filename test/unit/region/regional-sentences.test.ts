import { describe, expect, test } from 'vitest';
import {
  chanceSentence,
  discoveriesSentence,
  dryingSentence,
  emptySentence,
  kendallSentence,
} from '../../../lib/region/regional-sentences.ts';

const natural = { label: 'natural stations', single: 'natural station', set: 'all', ranked: 33 } as const;
const basis = { index: 'minimum', alpha: 0.1, rankBy: 'percent-per-decade' } as const;
const found = (count: number, bound: number) => ({ count, bound, expected: 1.6, p: 0.01 });
const kendall = { s: -900, z: -3.21, p: 0.0014, medianFigure: -4.12, r1: 0.2, serialFactor: 1.4 };

describe('chanceSentence', () => {
  test('says how many fall beside how many would by chance', () => {
    expect(chanceSentence(natural, found(14, 9), found(1, 8), basis)).toBe(
      '14 of 33 natural stations fall at the 10 % level; with no trend anywhere up to 9 would, in 95 of 100 regions ' +
        'that share weather as these do. 1 rises; up to 8 would.',
    );
  });

  test('has words for none and one, the independent set, other levels and other indices', () => {
    const set = { ...natural, set: 'independent', ranked: 20 } as const;
    expect(chanceSentence(set, found(0, 0), found(0, 3), { ...basis, alpha: 0.025 })).toBe(
      'None of 20 independent natural stations falls at the 2.5 % level; with no trend anywhere none would, in 95 of 100 ' +
        'regions that share weather as these do. None rises; up to 3 would.',
    );
    expect(chanceSentence(natural, found(2, 3), found(1, 3), { ...basis, index: 'minimum-date' })).toMatch(
      /^2 of 33 natural stations come earlier at the 10 % level; .* 1 comes later; up to 3 would\.$/,
    );
    expect(chanceSentence(natural, found(1, 3), found(2, 3), { ...basis, index: 'deficit' })).toMatch(
      /^1 of 33 natural stations has larger deficits at .* 2 have smaller deficits; up to 3 would\.$/,
    );
  });
});

describe('kendallSentence', () => {
  const signs = { negative: 30, zero: 0, positive: 3 };

  test('says the common trend with its median and the signs', () => {
    expect(kendallSentence(natural, kendall, signs, basis)).toBe(
      'Taken together, 33 natural stations have one common trend downward at the 10 % level (regional Kendall z −3.2, ' +
        'p 0.0014; median −4.1 % of the mean per decade): 30 slope down, 3 up.',
    );
  });

  test('does not round a p below the level up to it', () => {
    const close = { ...kendall, p: 0.09996 };
    expect(kendallSentence(natural, close, signs, basis)).toMatch(/one common trend downward .* p just below 0\.1;/);
    expect(kendallSentence(natural, { ...kendall, p: 0.094 }, signs, basis)).toMatch(/p 0\.094;/);
    expect(kendallSentence(natural, { ...kendall, p: 0.1 }, signs, basis)).toMatch(/no common trend .* p 0\.1;/);
  });

  test('does not take no trend found for no change', () => {
    const weak = { ...kendall, z: 0.4, p: 0.69, medianFigure: null };
    expect(kendallSentence(natural, weak, { negative: 15, zero: 2, positive: 16 }, basis)).toBe(
      'Taken together, 33 natural stations have no common trend at the 10 % level (regional Kendall z +0.4, p 0.69): ' +
        '15 slope down, 16 up, 2 neither way. This does not show that nothing changed.',
    );
  });

  test('says drier and earlier where up and down would mislead', () => {
    const days = { ...basis, index: 'zero-flow-days' } as const;
    expect(kendallSentence(natural, { ...kendall, medianFigure: 3.2 }, signs, days)).toBe(
      'Taken together, 33 natural stations have one common trend towards drier at the 10 % level (regional Kendall z ' +
        '−3.2, p 0.0014; median +3.2 days per decade): 30 grow drier, 3 wetter.',
    );
    expect(kendallSentence(natural, { ...kendall, z: 2 }, signs, { ...basis, index: 'minimum-date' })).toMatch(
      /one common trend towards later at .*: 30 come earlier, 3 later\.$/,
    );
  });

  test.each([
    [{ rankBy: 'kendall-tau' }, 'median −4.1 Kendall’s tau'],
    [{ rankBy: 'specific-change' }, 'median −4.1 L/s/km² per decade'],
    [{ index: 'deficit', rankBy: 'specific-change' }, 'median −4.1 mm per decade'],
    [{ index: 'minimum-date' }, 'median −4.1 days per decade'],
    [{ index: 'bfi', rankBy: 'specific-change' }, 'median −4.1 per decade'],
  ] as const)('names the figure under %o', (keys, words) => {
    expect(kendallSentence(natural, kendall, signs, { ...basis, ...keys })).toContain(words);
  });
});

test('discoveriesSentence is another sentence, over all ranked stations', () => {
  expect(discoveriesSentence(natural, { falling: 6, rising: 0 }, 40, basis)).toBe(
    'Singly, with 10 % of discoveries allowed to be false among all 40 ranked stations, 6 of 33 natural stations fall and ' +
      'none rises.',
  );
});

test('emptySentence and dryingSentence say what is left out', () => {
  expect(emptySentence({ ...natural, set: 'independent' })).toBe(
    'The independent set holds none of the natural stations: nothing can be said of them together.',
  );
  expect(dryingSentence({ stations: 1, falling: 0, rising: 1 })).toBe(
    '1 station under Drying is not counted here: by days without flow, with p adjusted among themselves, none dries for ' +
      'longer and 1 dries for shorter.',
  );
});
