import { describe, expect, test } from 'vitest';
import {
  amongSteepest,
  certaintyView,
  filledShare,
  placeSureness,
} from '@/app/regions/[region]/_certainty/certainty-view';
import { placeWords, toldApartWords } from '@/app/regions/[region]/_certainty/place-words';
import type { Certainty } from '@/lib/region/certainty-types';
import { mapRow } from '../map/map-row-builder.ts';

/** Three ranked stations and a drying one: places 1–2, 1–3 and 3. */
const CERTAINTY: Certainty = {
  replicates: 500,
  toldApart: true,
  trueSpread: 4,
  spans: [
    { code: 'a', rankLow: 1, rankHigh: 2, amongSteepest: [0.7, 0.95, 1] },
    { code: 'b', rankLow: 1, rankHigh: 3, amongSteepest: [0.3, 0.9, 1] },
    { code: 'c', rankLow: 3, rankHigh: 3, amongSteepest: [0, 0.15, 1] },
  ],
  detectable: [
    { code: 'a', perDecade: 0.2, percentPerDecade: 6.24 },
    { code: 'c', perDecade: 0.1, percentPerDecade: 11.6 },
    { code: 'dry', perDecade: 3.14, percentPerDecade: null },
  ],
};
const view = certaintyView(CERTAINTY);
const TERMS = { index: 'minimum', units: 'metric' } as const;

describe('amongSteepest', () => {
  test('reads the k-th entry, and is certain from the last place on', () => {
    expect([1, 2, 3, 50].map((k) => amongSteepest(view, 'b', k))).toEqual([0.3, 0.9, 1, 1]);
  });
  test('is unknown for a station without a place', () => {
    expect(amongSteepest(view, 'dry', 2)).toBeNull();
  });
});

describe('placeSureness', () => {
  test('is 0 where every place is open, 1 where one is, and in proportion between', () => {
    expect(['a', 'b', 'c'].map((code) => placeSureness(view, code))).toEqual([0.5, 0, 1]);
  });
  test('is 1 for a station alone, and unknown without a place', () => {
    const alone = certaintyView({
      ...CERTAINTY,
      spans: [{ code: 'a', rankLow: 1, rankHigh: 1, amongSteepest: [1] }],
    });
    expect(placeSureness(alone, 'a')).toBe(1);
    expect(placeSureness(view, 'dry')).toBeNull();
  });
});

test('filledShare is of what the map was asked to fill the discs by', () => {
  expect(filledShare(view, 'b', 'steepest', 2)).toBe(0.9);
  expect(filledShare(view, 'b', 'span', 2)).toBe(0);
});

describe('placeWords', () => {
  const row = (code: string, more = {}) => mapRow({ code, rank: 1, trend: 'none', percentPerDecade: -3, ...more });
  test('says span and probability, and beside no significant trend what would have shown', () => {
    expect(placeWords(view, row('a'), 2, TERMS)).toBe(
      'Place 1–2 of 3 with 90 % certainty; among the 2 steepest declines with a probability of 95\u00a0%; ±6.2 % per decade or more would have shown in four cases of five.',
    );
  });
  test('leaves out what would have shown where the trend is significant', () => {
    expect(placeWords(view, row('c', { trend: 'falling' }), 1, TERMS)).toBe(
      'Place 3 of 3 with 90 % certainty; the steepest decline with a probability of 0\u00a0%.',
    );
  });
  test('says of a drying station what would have shown in days', () => {
    const dry = row('dry', { rank: null, drying: true, zeroDaysPerDecade: 1 });
    expect(placeWords(view, dry, 5, TERMS)).toBe(
      '±3.1 days per decade or more would have shown in four cases of five.',
    );
  });
  test('says nothing of what is not known', () => {
    expect(placeWords(null, row('a'), 5, TERMS)).toBe('');
    expect(placeWords(view, row('elsewhere'), 5, TERMS)).toBe('');
  });
});

test('toldApartWords speaks only where the stations cannot be told apart', () => {
  expect(toldApartWords(view)).toBe('');
  expect(toldApartWords({ ...view, toldApart: false })).toMatch(
    /^These stations cannot be told apart: .*every one of the 3 places is open to each\.$/,
  );
});
