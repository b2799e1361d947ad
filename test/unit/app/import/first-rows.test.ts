import { expect, test } from 'vitest';
import { firstRows } from '@/app/components/import/first-rows';
import type { Inspection, UnderstoodRow } from '@/lib/intake/types';

const value = (row: number, station = 'A'): UnderstoodRow => ({
  ...{ row, station, date: '2001-01-01', value: 1, flag: '', bits: 0, problem: null },
});
const inspection = (change: Partial<Inspection>): Omit<Inspection, 'problems'> => ({
  ...{ mapping: null, header: null, preview: [], valueCandidates: [], understood: [], others: [], facts: [] },
  ...{ sheets: null, ...change },
});

test('firstRows puts each line beside its values and leaves the header away', () => {
  const rows = firstRows(
    inspection({
      header: ['date', 'A', 'B'],
      preview: [
        ['date', 'A', 'B'],
        ['1', '2', '3'],
        ['x', '', ''],
      ],
      previewLines: [4, 5, 7],
      understood: [value(5, 'A'), value(5, 'B')],
    }),
  );
  expect(rows.map(({ line, fields, values }) => [line, fields?.[0], values.map(({ station }) => station)])).toEqual([
    [5, '1', ['A', 'B']],
    [7, 'x', []],
  ]);
});

test('firstRows shows of lines beyond those shown only what is wrong, and of a document the values alone', () => {
  const bad = { ...value(9), problem: 'no date' };
  const [shown, ...beyond] = firstRows(
    inspection({ preview: [['1']], previewLines: [1], understood: [value(1), value(2), bad] }),
  );
  expect([shown.fields, beyond]).toEqual([['1'], [{ line: 9, fields: null, values: [bad] }]]);
  const rows = firstRows(inspection({ preview: [['A', '2001-01-01']], understood: [value(1), value(2)] }));
  expect(rows.map(({ line, fields, values }) => [line, fields, values.length])).toEqual([
    [1, null, 1],
    [2, null, 1],
  ]);
});

test('firstRows keeps to what fits on a screen: six values of a line, those of twenty lines in all', () => {
  const understood = Array.from({ length: 30 }, (_, line) =>
    Array.from({ length: 31 }, (_day, day) => value(line + 1, String(day))),
  ).flat();
  const rows = firstRows(inspection({ understood }));
  expect(rows.map(({ values }) => values.length)).toEqual(Array.from({ length: 20 }, () => 6));
});
