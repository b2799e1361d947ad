import { expect, test } from 'vitest';
import { csvFields, csvOfStations, csvRecords } from '@/app/regions/[region]/_ranking/csv-subset';

const TABLE = [
  'rank,station_code,station_name',
  '1,007,"Weir, old"',
  '2,8,"The ""Inch"""',
  ',9,"two\r\nlines"',
  '',
].join('\r\n');

test('csvOfStations keeps header and rows byte for byte, commas, quotes and line ends in fields included', () => {
  expect(csvOfStations(TABLE, new Set(['007', '9']))).toBe(
    'rank,station_code,station_name\r\n1,007,"Weir, old"\r\n,9,"two\r\nlines"\r\n',
  );
  expect(csvOfStations(TABLE, new Set(['007', '8', '9']))).toBe(TABLE);
  expect(csvOfStations(TABLE, new Set())).toBe('rank,station_code,station_name\r\n');
});

test('csvOfStations does not take 7 for 007', () => {
  expect(csvRecords(csvOfStations(TABLE, new Set(['7'])))).toHaveLength(1);
});

test('csvFields takes the quotes off and keeps empty fields', () => {
  expect(csvFields(',8,"The ""Inch""",\r\n')).toEqual(['', '8', 'The "Inch"', '']);
});

test('csvOfStations names what is missing', () => {
  expect(() => csvOfStations('a,b\r\n', new Set())).toThrow(RangeError);
});
