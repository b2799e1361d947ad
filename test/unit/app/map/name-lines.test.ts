import { expect, test } from 'vitest';
import { nameLines } from '@/app/regions/[region]/_ranking/name-lines';

test.each([
  ['Little Ambry at Sallow', ['Little Ambry', 'at Sallow']],
  ['KESTRANE RIVER NEAR OLD MILL, XX', ['KESTRANE RIVER', 'NEAR OLD MILL, XX']],
  ['Vennel below Tarn at Foot', ['Vennel', 'below Tarn at Foot']],
  ['Nearby Brook', ['Nearby Brook', '']],
  ['Catbury', ['Catbury', '']],
  ['at Weir', ['at Weir', '']],
])('nameLines parts %j where the place begins', (name, lines) => {
  expect(nameLines(name)).toEqual(lines);
});
