import { expect, test } from 'vitest';
import { parseChanges } from '../../../../lib/intake/registry/dated-changes.ts';

test('parseChanges reads dates, kinds and notes, and takes what is no kind for a note', () => {
  expect(
    parseChanges(
      '2001-05-01 dam: Upper Kell; 1999-01-01 gauge moved;2010-09-30: new sluice; 2012-01-01 damage to weir',
    ),
  ).toEqual([
    { date: '2001-05-01', kind: 'dam', note: 'Upper Kell' },
    { date: '1999-01-01', kind: 'gauge moved', note: '' },
    { date: '2010-09-30', kind: 'other', note: 'new sluice' },
    { date: '2012-01-01', kind: 'other', note: 'damage to weir' },
  ]);
  expect(parseChanges('')).toEqual([]);
});

test.each(['dam 2001', '2001-02-30 dam', 'x; 2001-01-01 dam', '2001-01-011 dam'])(
  'parseChanges(“%s”) gives the piece without a date',
  (text) => {
    expect(typeof parseChanges(text)).toBe('string');
  },
);
