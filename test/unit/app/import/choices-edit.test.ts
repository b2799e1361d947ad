import { expect, test } from 'vitest';
import { edited, sameChoices, shownMapping } from '@/app/components/import/choices-edit';
import type { Mapping } from '@/lib/intake/types';

const MAPPING: Mapping = {
  layout: 'long',
  station: { from: 'file-name' },
  date: { columns: [0], order: 'ymd' },
  value: { column: 1 },
  flag: null,
  unit: null,
  missing: [],
  decimal: '.',
};

test('edited lays keys over what was said, and an undefined key goes back to what is recognised', () => {
  const once = edited({}, { mapping: { unit: 'L/s', decimal: ',' } });
  expect(once).toEqual({ mapping: { unit: 'L/s', decimal: ',' } });
  expect(edited(once, { mapping: { decimal: undefined } })).toEqual({ mapping: { unit: 'L/s' } });
  expect(edited(once, { mapping: { decimal: undefined, unit: undefined } })).toEqual({});
  expect(edited({ station: '7' }, { station: undefined, matchCodes: true })).toEqual({ matchCodes: true });
});

test('edited drops places with a new layout, delimiter or sheet, and keeps what does not hang on them', () => {
  const said = { mapping: { unit: 'L/s', value: { column: 3 }, date: { columns: [1], order: 'dmy' } } } as const;
  for (const [key, value] of [
    ['layout', 'wide'],
    ['delimiter', ';'],
    ['sheet', 'Daily'],
  ]) {
    const { mapping } = edited(structuredClone(said) as never, { mapping: { [key]: value } });
    expect(mapping).toEqual({ unit: 'L/s', [key]: value });
  }
});

test('edited never changes what it was given, and a reset begins anew', () => {
  const said = { kind: 'flows', mapping: { unit: 'L/s' } } as const;
  expect(edited(said, { reset: true, mapping: { decimal: ',' } })).toEqual({ mapping: { decimal: ',' } });
  expect(said).toEqual({ kind: 'flows', mapping: { unit: 'L/s' } });
});

test('sameChoices does not mind the order in which things were said', () => {
  expect(
    sameChoices({ unit: 'L/s', mapping: { a: 1, b: [1, 2] } }, { mapping: { b: [1, 2], a: 1 }, unit: 'L/s' }),
  ).toBe(true);
  expect(sameChoices({ mapping: { b: [1, 2] } }, { mapping: { b: [2, 1] } })).toBe(false);
});

test('shownMapping shows a choice before the server has answered it', () => {
  expect(shownMapping(MAPPING, {}).unit).toBeNull();
  expect(shownMapping(MAPPING, { unit: 'm3/s' }).unit).toBe('m3/s');
  expect(shownMapping(MAPPING, { unit: 'm3/s', mapping: { unit: 'L/s', decimal: ',' } })).toMatchObject({
    unit: 'L/s',
    decimal: ',',
  });
});
