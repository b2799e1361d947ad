import { describe, expect, test } from 'vitest';
import { answeredAlike, isAnswered, isAsked, withAnswers } from '@/app/components/import/answers';
import { sizeText } from '@/app/components/import/chosen-files';
import type { Mapping } from '@/lib/intake/types';
import type { ImportProblem } from '@/lib/jobs/import-types';

const MAPPING: Mapping = {
  layout: 'fixed-width',
  station: { from: 'file-name' },
  date: {
    columns: [
      [0, 4],
      [4, 6],
      [6, 8],
    ],
    order: 'ymd',
  },
  value: null,
  flag: null,
  unit: null,
  missing: [],
  decimal: '.',
};

type Needs = NonNullable<ImportProblem['problem']>['needs'];

const problem = (file: string, needs?: Needs): ImportProblem => ({
  file,
  message: 'no',
  problem: { file, message: 'no', remedy: 'Say.', ...(needs ? { needs } : {}) },
  inspection: {
    mapping: MAPPING,
    header: null,
    preview: [],
    valueCandidates: [],
    understood: [],
    others: [],
    facts: [],
    sheets: null,
  },
});

describe('isAnswered', () => {
  test.each([
    ['unit', { unit: 'L/s' }],
    ['station', { station: '01' }],
    ['date-order', { dateOrder: 'dmy' }],
    ['mapping', { value: { slice: [8, 18] }, unit: 'mm/d' }],
    ['revise', { revise: true }],
  ] as const)('%s: by its own answer only', (needs, answer) => {
    expect(isAnswered(problem('f', needs), undefined)).toBe(false);
    expect(isAnswered(problem('f', needs), {})).toBe(false);
    expect(isAnswered(problem('f', needs), structuredClone(answer) as never)).toBe(true);
  });

  test('a column is only half an answer where the file does not tell its unit', () => {
    const asked = problem('f', 'mapping');
    expect(isAnswered(asked, { value: { slice: [8, 18] } })).toBe(false);
    const told = { ...asked, inspection: { ...asked.inspection!, mapping: { ...MAPPING, unit: 'mm/d' as const } } };
    expect(isAnswered(told, { value: { slice: [8, 18] } })).toBe(true);
  });

  test('a blank station is no answer', () => {
    expect(isAnswered(problem('f', 'station'), { station: '  ' })).toBe(false);
  });

  test('a missing drainage area is nothing that a screen could answer', () => {
    expect(isAsked(problem('f', 'area'))).toBe(false);
    expect(isAnswered(problem('f', 'area'), { unit: 'L/s' })).toBe(false);
  });

  test('a file that asks nothing can only be left out', () => {
    expect(isAnswered(problem('f'), { unit: 'L/s' })).toBe(false);
    expect(isAnswered(problem('f'), { leaveOut: true })).toBe(true);
  });
});

describe('withAnswers', () => {
  test('keeps what was answered in an earlier try', () => {
    const first = withAnswers({ by: 'Ada' }, [problem('f', 'unit')], { f: { unit: 'ft3/s' } });
    const second = withAnswers(first, [problem('f', 'station')], { f: { station: ' 07 ' } });
    expect(second).toEqual({ by: 'Ada', files: { f: { unit: 'ft3/s', station: '07' } } });
  });

  test('a chosen column keeps the layout that was recognised', () => {
    const { files } = withAnswers({}, [problem('f', 'mapping')], { f: { value: { slice: [8, 18] }, unit: 'mm/d' } });
    expect(files?.f).toEqual({ unit: 'mm/d', mapping: { layout: 'fixed-width', value: { slice: [8, 18] } } });
  });

  test('a date order keeps the columns that were recognised', () => {
    const { files } = withAnswers({}, [problem('f', 'date-order')], { f: { dateOrder: 'mdy' } });
    expect(files?.f.mapping?.date).toEqual({ columns: MAPPING.date.columns, order: 'mdy' });
  });

  test('revise stands for the whole import', () => {
    expect(withAnswers({}, [problem('f', 'revise')], { f: { revise: true } }).revise).toBe(true);
    expect(withAnswers({}, [problem('f', 'unit')], { f: { unit: 'L/s' } }).revise).toBeUndefined();
  });

  test('a file left out gets no choices, and what was given before is left unchanged', () => {
    const before = { files: { g: { unit: 'L/s' as const } } };
    const copy = structuredClone(before);
    expect(withAnswers(before, [problem('f', 'unit')], { f: { leaveOut: true, unit: 'm3/s' } })).toEqual(before);
    expect(before).toEqual(copy);
  });
});

describe('answeredAlike', () => {
  const column = { slice: [8, 18] as [number, number] };
  const asking = (file: string, needs: Needs, layout: Mapping['layout'] = 'fixed-width', known = true) => {
    const asked = problem(file, needs);
    const valueCandidates = known ? [{ place: column, label: '', samples: [] }] : [];
    return { ...asked, inspection: { ...asked.inspection!, mapping: { ...MAPPING, layout }, valueCandidates } };
  };

  test('files that ask the same and are laid out the same take the answer, others do not', () => {
    const problems = [asking('a', 'unit'), asking('b', 'unit'), asking('c', 'unit', 'long'), asking('d', 'station')];
    expect(answeredAlike({}, problems, problems[0], { unit: 'ft3/s' })).toEqual({
      a: { unit: 'ft3/s' },
      b: { unit: 'ft3/s' },
    });
  });

  test('an answer of a file’s own stands; one that was taken over follows a change', () => {
    const problems = [asking('a', 'unit'), asking('b', 'unit'), asking('c', 'unit')];
    const first = answeredAlike({ c: { unit: 'L/s' } }, problems, problems[0], { unit: 'ft3/s' });
    const second = answeredAlike(first, problems, problems[0], { unit: 'm3/s' });
    expect(second).toEqual({ a: { unit: 'm3/s' }, b: { unit: 'm3/s' }, c: { unit: 'L/s' } });
  });

  test('a column is taken over only where the file has it', () => {
    const problems = [asking('a', 'mapping'), asking('b', 'mapping'), asking('c', 'mapping', 'fixed-width', false)];
    expect(answeredAlike({}, problems, problems[0], { value: column })).toEqual({
      a: { value: column },
      b: { value: column },
    });
  });

  test('leaving a file out leaves the others alone', () => {
    const problems = [asking('a', 'unit'), asking('b', 'unit')];
    expect(answeredAlike({}, problems, problems[0], { leaveOut: true })).toEqual({ a: { leaveOut: true } });
  });
});

test('sizeText rounds to what is read at a glance', () => {
  expect([0, 999, 1000, 1_234_567, 999_499, 999_500, 1.2e9].map(sizeText)).toEqual([
    '0 bytes',
    '999 bytes',
    '1.0 kB',
    '1.2 MB',
    '999 kB',
    '1.0 MB',
    '1.2 GB',
  ]);
});
