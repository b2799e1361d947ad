import { expect, test } from 'vitest';
import { type DetectableTerms, detectableText } from '@/app/regions/[region]/_certainty/detectable-text';

const trend = (perDecade: number | null, percentPerDecade: number | null) => ({
  code: 'a',
  perDecade,
  percentPerDecade,
});
const MINIMA: DetectableTerms = { index: 'minimum', drying: false, units: 'metric' };

test.each<[string, ReturnType<typeof trend> | undefined, Partial<DetectableTerms>, string]>([
  ['percent where there is one', trend(0.2, 6.24), {}, '±6.2 %'],
  ['percent without a sign of its own', trend(-0.2, -6.24), {}, '±6.2 %'],
  ['all figures before the point', trend(2, 128.4), {}, '±128 %'],
  ['flows where the mean is 0', trend(0.0123, null), {}, '±0.012 m³/s'],
  // 1 ft³/s = 0.3048³ m³/s = 0.0283168466 m³/s, by the definition of the foot
  ['flows in US units', trend(0.283168466, null), { units: 'us' }, '±10 ft³/s'],
  ['days under Drying', trend(3.14, null), { drying: true }, '±3.1 days'],
  ['days of dates', trend(4.06, null), { index: 'minimum-date' }, '±4.1 days'],
  ['a number without unit', trend(0.034, null), { index: 'bfi' }, '±0.034'],
  ['a dash where it is not known', trend(null, null), {}, '–'],
  ['a dash for a station without one', undefined, {}, '–'],
])('detectableText: %s', (_, given, terms, text) => {
  expect(detectableText(given, { ...MINIMA, ...terms })).toBe(text);
});
