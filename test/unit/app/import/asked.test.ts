import { expect, test } from 'vitest';
import { sortOut } from '@/app/components/import/asked';
import type { PreviewProblem } from '@/lib/jobs/upload-types';

const problem = (change: Partial<PreviewProblem['problem']>): PreviewProblem => ({
  message: 'words for the batch command',
  problem: { file: 'a.csv', message: 'something is open', remedy: 'Say it', ...change },
});
const SIGHT = { stale: false, changed: null, document: false, station: 'file-name' } as const;

test('sortOut puts each problem beside the control that answers it, with row and value', () => {
  const { asked, others } = sortOut(
    [
      problem({ needs: 'unit', value: 'flow' }),
      problem({ needs: 'date-order', row: 7 }),
      problem({ needs: 'station' }),
    ],
    SIGHT,
  );
  expect(asked).toEqual({
    unit: 'Something is open (“flow”).',
    date: 'Row 7: something is open.',
    station: 'Something is open.',
  });
  expect(others).toEqual([]);
});

test('sortOut leaves to others what no control answers: an area, codes, a fault in the file', () => {
  const given = [problem({ needs: 'area' }), problem({ needs: 'codes' }), problem({ row: 3 })];
  expect(sortOut(given, SIGHT)).toEqual({ asked: {}, others: given });
});

test('several quantities are told apart by the rows of a table, and by the series of a document', () => {
  const given = [problem({ needs: 'quantity' })];
  expect(Object.keys(sortOut(given, SIGHT).asked)).toEqual(['where']);
  expect(Object.keys(sortOut(given, { ...SIGHT, document: true }).asked)).toEqual(['quantity']);
});

test('an unknown station is asked for where the file names none, and not where its codes stand in it', () => {
  const given = [problem({ needs: 'station' })];
  expect(sortOut(given, { ...SIGHT, station: 'given' }).asked.station).toBeDefined();
  for (const station of ['column', 'header'] as const) {
    expect(sortOut(given, { ...SIGHT, station }).others).toEqual(given);
  }
});

test('choices that cannot be read are the doing of the control changed last', () => {
  const given = [problem({ needs: 'mapping' })];
  expect(Object.keys(sortOut(given, SIGHT).asked)).toEqual(['columns']);
  expect(Object.keys(sortOut(given, { ...SIGHT, stale: true, changed: 'thousands' }).asked)).toEqual(['thousands']);
});
