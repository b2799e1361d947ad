import { expect, test } from 'vitest';
import { inspectFile } from '../../../lib/intake/inspect-file.ts';
import type { Inspection, InspectOptions } from '../../../lib/intake/types.ts';
import { withFile } from './reading.ts';

const inspect = (text: string, options: Partial<InspectOptions> = {}): Promise<Inspection> =>
  withFile(text, (path) => inspectFile(path, { fileName: 'gauge.csv', ...options }));

test('inspectFile says how a good file will be read, with its header and first rows, and no problems', async () => {
  const seen = await inspect('station,date,flow_cfs,flag\n007,2001-03-01,1.50,A\n');
  expect(seen).toEqual({
    mapping: {
      ...{ layout: 'long', station: { from: 'column', column: 0 }, date: { columns: [1], order: 'ymd' } },
      ...{ value: { column: 2 }, flag: { column: 3 }, unit: 'ft3/s', missing: [], decimal: '.', delimiter: ',' },
    },
    header: ['station', 'date', 'flow_cfs', 'flag'],
    preview: [
      ['station', 'date', 'flow_cfs', 'flag'],
      ['007', '2001-03-01', '1.50', 'A'],
    ],
    problems: [],
    valueCandidates: [{ place: { column: 2 }, label: 'flow_cfs', samples: ['1.50'] }],
  });
});

test('inspectFile offers the slices of a fixed-width file and asks for column and unit', async () => {
  const lines = ['1948 1 1    0.0000    0.4600', '1948 1 2    0.0000    0.4550', '19481231    1.0000  -99.0000'];
  const seen = await inspect(lines.join('\n'), { fileName: 'x.dly' });
  expect(seen.mapping).toMatchObject({
    ...{ layout: 'fixed-width', station: { from: 'file-name' }, value: null, unit: null },
    date: {
      columns: [
        [0, 4],
        [4, 6],
        [6, 8],
      ],
      order: 'ymd',
    },
  });
  expect(seen.problems.map(({ problem }) => problem.needs)).toEqual(['mapping', 'unit']);
  expect(seen.valueCandidates).toEqual([
    { place: { slice: [8, 18] }, label: 'characters 9–18', samples: ['0.0000', '0.0000', '1.0000'] },
    { place: { slice: [18, 28] }, label: 'characters 19–28', samples: ['0.4600', '0.4550', '-99.0000'] },
  ]);
  expect(seen.preview[0]).toEqual(['1948', '1', '1', '0.0000', '0.4600']);
});

test('inspectFile lays a partial mapping and a unit over what it recognised', async () => {
  const text = 'station,date,upper,lower\nX,2001-01-01,1,2\n';
  expect((await inspect(text, { unit: 'L/s' })).problems.map(({ problem }) => problem.needs)).toEqual(['mapping']);
  const answered = await inspect(text, { unit: 'L/s', mapping: { value: { column: 'lower' } } });
  expect(answered.problems).toEqual([]);
  expect(answered.mapping).toMatchObject({ layout: 'long', value: { column: 'lower' }, unit: 'L/s' });
});

test('inspectFile of a file that nothing can be made of has its problem and no mapping', async () => {
  const seen = await inspect('');
  expect(seen).toMatchObject({ mapping: null, header: null, preview: [], valueCandidates: [] });
  expect(seen.problems[0].message).toMatch(/gauge.csv: the file is empty/);
});

test('inspectFile finds the date order, and asks for it where no date says it', async () => {
  const decided = await inspect('date,flow_m3s\n1/2/2001,1\n1/13/2001,2\n');
  expect(decided.mapping?.date).toEqual({ columns: [0], order: 'mdy' });
  expect(decided.problems).toEqual([]);
  const open = await inspect('date,flow_m3s\n1/2/2001,1\n');
  expect(open.problems.map(({ problem }) => problem.needs)).toEqual(['date-order']);
});
