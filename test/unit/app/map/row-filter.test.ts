import { expect, test } from 'vitest';
import { fold, hasPlace, matcher, tabOf } from '@/app/regions/[region]/row-filter';
import { mapRow } from './map-row-builder.ts';

const row = mapRow({ code: '00457', name: 'Krška vas', river: 'Kŕka' });

test('matcher finds every word in code, name or river, without marks and case', () => {
  expect(matcher('krska')(row)).toBe(true);
  expect(matcher('VAS 0045')(row)).toBe(true);
  expect(matcher('krska mill')(row)).toBe(false);
  expect(matcher('   ')(row)).toBe(true);
});

test('fold takes marks off letters', () => {
  expect(fold('Ljubljana Šmartno Çay Øre')).toBe('ljubljana smartno cay øre');
});

test('tabOf puts every station into one list', () => {
  expect(tabOf(mapRow({ rank: 1 }))).toBe('ranked');
  expect(tabOf(mapRow({ drying: true }))).toBe('drying');
  expect(tabOf(mapRow({}))).toBe('unranked');
});

test('hasPlace needs both coordinates, and 0 is a coordinate', () => {
  expect(hasPlace(mapRow({ latitude: 0, longitude: 0 }))).toBe(true);
  expect(hasPlace(mapRow({ latitude: 46 }))).toBe(false);
});
