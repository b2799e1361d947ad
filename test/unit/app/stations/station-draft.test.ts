import { expect, test } from 'vitest';
import {
  ALL_YEAR,
  draftOf,
  type EditableFacts,
  readDraft,
  type StationDraft,
} from '../../../../app/regions/[region]/stations/[code]/edit/station-draft.ts';

const FACTS: EditableFacts = {
  ...{
    name: 'Ford',
    river: 'Weir',
    latitude: 46.25,
    longitude: -14.5,
    areaKm2: 123.456789012345,
    influence: 'natural',
  },
  changes: [{ date: '1990-01-01', kind: 'dam', note: 'Filled.' }],
  namedFlows: [
    { name: 'Stop', kind: 'abstraction stop', value: 400, unit: 'L/s', months: [5, 6] },
    { name: 'Least', kind: 'legal minimum', value: 0.2, unit: 'm3/s', months: null },
  ],
  notes: 'Seen.',
};
const read = (change: Partial<StationDraft>, facts = FACTS) => readDraft({ ...draftOf(facts), ...change }, facts);
const problemsOf = (change: Partial<StationDraft>) => Object.keys(read(change).problems);

test('a form that nobody touched changes nothing, to the last digit', () => {
  expect(read({})).toEqual({ patch: {}, problems: {} });
});

test('readDraft tells only what differs', () => {
  expect(read({ river: ' Brook ', latitude: '−12.5' }).patch).toEqual({ river: 'Brook', latitude: -12.5 });
  expect(read({ latitude: '', longitude: '' }).patch).toEqual({ latitude: null, longitude: null });
  expect(read({ notes: '' }).patch).toEqual({ notes: '' });
});

test.each([
  // NIST SP 811: a mile is 1.609344 km, an acre 4046.8564224 m², a hectare 10,000 m²
  ['10', 'mi²', 25.89988110336],
  ['640', 'acres', 2.589988110336],
  ['50', 'ha', 0.5],
  ['12.5', 'km²', 12.5],
] as const)('an area of %s %s is kept as %d km²', (area, areaUnit, km2) => {
  expect(read({ area, areaUnit }).patch.areaKm2).toBeCloseTo(km2, 12);
});

test('readDraft says beside which field what is wrong', () => {
  expect(problemsOf({ name: ' ' })).toEqual(['name']);
  expect(problemsOf({ latitude: '91' })).toEqual(['latitude']);
  expect(problemsOf({ latitude: '90', longitude: '180' })).toEqual([]);
  expect(problemsOf({ longitude: '46,5' })).toEqual(['longitude']);
  expect(problemsOf({ longitude: '' })).toEqual(['longitude']);
  expect(problemsOf({ area: '0' })).toEqual(['area']);
  expect(problemsOf({ area: '1,234' })).toEqual(['area']);
  expect(problemsOf({ area: '1e2' })).toEqual([]);
  expect(problemsOf({ changes: [{ key: 4, date: '1990-02-30', kind: 'dam', note: '' }] })).toEqual(['changes.4.date']);
  const flow = { key: 7, name: 'A', kind: 'other', value: '1', unit: 'm3/s', months: ALL_YEAR } as const;
  const flows = (...changes: object[]) => ({
    flows: changes.map((change) => ({ ...flow, months: [...ALL_YEAR], ...change })),
  });
  expect(problemsOf(flows({}))).toEqual([]);
  expect(problemsOf(flows({}, { key: 8 }))).toEqual(['flows.7.name', 'flows.8.name'].slice(1));
  expect(problemsOf(flows({ value: '-1' }))).toEqual(['flows.7.value']);
  expect(problemsOf(flows({ months: [] }))).toEqual(['flows.7.months']);
  expect(problemsOf({ ...flows({ unit: 'mm/d' }), area: '' })).toEqual(['flows.7.value']);
  expect(problemsOf(flows({ unit: 'mm/d' }))).toEqual([]);
  expect(read({ name: '', river: 'Other' }).patch).toEqual({});
});

test('months are kept in the order of the year, and all twelve as all year', () => {
  const [first, second] = draftOf(FACTS).flows;
  expect(second.months).toEqual(ALL_YEAR);
  const { patch } = read({ flows: [{ ...first, months: [12, 1, 6] }, second] });
  expect(patch.namedFlows?.map(({ months }) => months)).toEqual([[1, 6, 12], null]);
});
