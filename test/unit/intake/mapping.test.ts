import { expect, test } from 'vitest';
import { columnPosition, parseMapping } from '../../../lib/intake/mapping.ts';
import { IntakeError } from '../../../lib/intake/types.ts';
import { FIXED_WIDTH } from '../../fixed-width.ts';

test('parseMapping takes a whole mapping, any subset of its keys, and nothing at all', () => {
  const whole = { ...FIXED_WIDTH, missing: ['-99.0000'] };
  expect(parseMapping(whole, 'm.json')).toEqual(whole);
  expect(parseMapping({ value: { column: 'flow' } }, 'm.json')).toEqual({ value: { column: 'flow' } });
  expect(parseMapping({}, 'm.json')).toEqual({});
  const further = {
    ...{ layout: 'day-rows', decimal: ',', thousands: '.', firstYear: 2100, dailyMean: 0.8, sheet: 'Tabelle 1' },
    ...{ quantity: 'stage', unit: 'cm' },
    also: [{ quantity: 'rainfall', unit: 'in', value: { column: 2 }, where: { column: 'PARAM', equals: '2' } }],
  };
  expect(parseMapping(further, 'm.json')).toEqual(further);
});

test.each([
  [{ unit: 'gpm' }, /“unit” cannot be read \(“"gpm"”\)\. It takes m3\/s, L\/s/],
  [{ layout: 'csv' }, /“layout” cannot be read/],
  [{ value: { slice: [38, 28] } }, /“value” cannot be read/],
  [{ value: { column: -1 } }, /“value” cannot be read/],
  [{ value: { column: 1, slice: [0, 1] } }, /“value” cannot be read/],
  [{ date: { columns: [0, 1], order: 'ymd' } }, /“date” cannot be read/],
  [{ date: { columns: [0], order: 'ydm' } }, /“date” cannot be read/],
  [{ station: { from: 'column' } }, /“station” cannot be read/],
  [{ delimiter: '|' }, /“delimiter” cannot be read/],
  [{ unit: 'mm' }, /“unit” cannot be read/],
  [{ unit: 'm3/s', quantity: 'stage' }, /“unit” cannot be read/],
  [{ decimal: ',', thousands: ',' }, /“thousands” cannot be read/],
  [{ dailyMean: 1.01 }, /“dailyMean” cannot be read/],
  [{ firstYear: 2101 }, /“firstYear” cannot be read/],
  [{ quantity: 'turbidity' }, /“quantity” cannot be read.*rainfall \(in mm, in\)/],
  [{ also: [{ quantity: 'stage', unit: 'L/s', value: null }] }, /“also” cannot be read/],
  [{ also: [{ quantity: 'flow', unit: 'L/s', value: null }] }, /“also” cannot be read/],
  [{ sheet: '' }, /“sheet” cannot be read/],
  [{ colour: 'red' }, /has no key “colour”/],
  ['flow', /must be a JSON object/],
  [null, /must be a JSON object/],
])('parseMapping refuses %j by the key at fault', (input, message) => {
  const parse = () => parseMapping(input, 'm.json');
  expect(parse).toThrow(IntakeError);
  expect(parse).toThrow(message);
  expect(parse).toThrow(/^m\.json/);
});

test('columnPosition finds a heading exactly, else without regard to case; numbers are positions', () => {
  const header = ['Flow', 'flow', ' Date '];
  expect(columnPosition(7, header, 'f')).toBe(7);
  expect(columnPosition('flow', header, 'f')).toBe(1);
  expect(columnPosition('date', header, 'f')).toBe(2);
  expect(() => columnPosition('stage', header, 'f')).toThrow(/“Flow”, “flow”/);
  expect(() => columnPosition('stage', null, 'f')).toThrow(/no header row/);
});
