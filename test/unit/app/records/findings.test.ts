import { expect, test } from 'vitest';
import { figuresOf } from '@/app/regions/[region]/records/_findings/finding-words';
import {
  countFindings,
  groupFindings,
  type StationCounts,
  surroundings,
} from '@/app/regions/[region]/records/_findings/group-findings';

const stations = [
  { code: 'A', name: 'Lom' },
  { code: 'B', name: 'Žiri' },
  { code: 'C', name: 'Obir' },
];
const byStation: StationCounts[] = [
  { code: 'A', counts: [{ kind: 'jump', state: 'open', count: 1 }] },
  {
    code: 'B',
    counts: [
      { kind: 'flat', state: 'open', count: 2 },
      { kind: 'jump', state: 'rejected', count: 3 },
    ],
  },
  { code: 'gone', counts: [{ kind: 'jump', state: 'open', count: 9 }] },
];
const all = { kind: null, state: null, search: '' };
const shown = (filter: Partial<Parameters<typeof groupFindings>[2]>, first?: string) =>
  groupFindings(byStation, stations, { ...all, ...filter }, first).map(({ station, count, open }) => [
    ...[station.code, count, open],
  ]);

test('groupFindings puts the station with the most open findings first and leaves out those without any', () => {
  expect(shown({})).toEqual([
    ['B', 5, 2],
    ['A', 1, 1],
  ]);
});

test('groupFindings puts the station that a link leads to before all others, whatever is searched for', () => {
  expect(shown({}, 'A').map(([code]) => code)).toEqual(['A', 'B']);
  expect(shown({ search: 'ziri' }, 'A').map(([code]) => code)).toEqual(['A', 'B']);
});

test('groupFindings filters by kind, state and words', () => {
  expect(shown({ kind: 'flat' })).toEqual([['B', 2, 2]]);
  expect(shown({ state: 'rejected' })).toEqual([['B', 3, 0]]);
  expect(shown({ search: 'ziri' })).toEqual([['B', 5, 2]]);
  expect(shown({ search: 'obir' })).toEqual([]);
});

test('countFindings counts by state', () => {
  expect(countFindings(byStation.slice(0, 2))).toEqual({ open: 3, rejected: 3, accepted: 0, noted: 0 });
});

test('surroundings: at least 20 days each side, as many as the stretch is long, at most 400, of at most ten years; a step ten years', () => {
  expect(surroundings('jump', 1000, 1000)).toEqual([980, 1020]);
  expect(surroundings('jump', 1000, 1049)).toEqual([950, 1099]);
  expect(surroundings('jump', 1000, 1999)).toEqual([600, 2399]);
  expect(surroundings('jump', 1000, 30_000)).toEqual([600, 1000 + 3652 + 400]);
  expect(surroundings('step', 10_000, 10_000)).toEqual([10_000 - 3652, 10_000 + 3652]);
});

test.each([
  [
    'jump',
    { before: 0.412, value: 31.2, ratio: 75.73, limit: 12.4 },
    /^0\.412 m³\/s before, 31\.2 m³\/s after: .*75\.7, beyond 12\.4$/,
  ],
  ['flat', { value: 1.5, share: 0.015 }, /^1\.50 m³\/s every day; 1\.5 % of the record/],
  ['flat', { value: 1.5, share: 0.0004 }, /; less than 0\.1 % of the record/],
  [
    'step',
    { meanBefore: 2, meanAfter: 1, yearsBefore: 20, yearsAfter: 1 },
    /^mean 2\.00 m³\/s over 20 years before, 1\.00 m³\/s over 1 year after$/,
  ],
  ['unit-change', { factor: 35.3, ratio: 36.1 }, /^36\.1 times .* factor 35\.3/],
  ['repeated', { copyOf: '1990-05-01' }, /1990-05-01/],
  ['negative', { lowest: -0.2 }, /^lowest −0\.200 m³\/s$/],
  ['future', { today: '2026-01-01' }, /2026-01-01/],
  ['too-large', { highest: 4000, specific: 40 }, /^up to 4,000 m³\/s, 40,000 L\/s\/km²$/],
  ['jump', { more: 312 }, /^312 findings of this kind/],
] as const)('figuresOf a %s says its figures with units', (kind, detail, words) => {
  expect(figuresOf({ kind, detail }, 'metric').replaceAll('\u00a0', ' ')).toMatch(words);
});
