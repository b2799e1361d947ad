import { expect, test } from 'vitest';
import { writeCodes } from '@/app/components/codes-in-address';
import { readPairView } from '@/app/regions/[region]/pair/pair-view';

const read = (query: string) => readPairView(new URLSearchParams(query));

test('readPairView of an address without a choice leaves all open', () => {
  expect(read('days=30')).toEqual({ station: null, references: null, weather: {} });
  expect(read('station=')).toEqual({ station: null, references: null, weather: {} });
});

test('readPairView tells no reference from none named, and names each once', () => {
  expect(read('station=A1&with=').references).toEqual([]);
  expect(read('with=B2,C3,B2').references).toEqual(['B2', 'C3']);
});

test('what writeCodes writes, readPairView reads, commas and percent signs in codes too', () => {
  const codes = ['B2', 'C,3', '100%', 'ü/4'];
  const query = new URLSearchParams({ with: writeCodes(codes) });
  expect(readPairView(query).references).toEqual(codes);
  expect(read('with=100%25').references).toEqual(['100%']);
});

test('readPairView passes over weather that cannot be', () => {
  expect(read('quantity=rainfall&from=B2&antecedentDays=90').weather).toEqual({
    quantity: 'rainfall',
    from: 'B2',
    antecedentDays: 90,
  });
  for (const days of ['0', '732', '1.5', 'x', '-3']) expect(read(`antecedentDays=${days}`).weather).toEqual({});
  expect(read('quantity=flow').weather).toEqual({});
  expect(read('antecedentDays=1').weather).toEqual({ antecedentDays: 1 });
  expect(read('antecedentDays=731').weather).toEqual({ antecedentDays: 731 });
});
