import { expect, test } from 'vitest';
import { newTerm, readRecipe, recipeDraftOf } from '../../../../app/components/station-form/recipe-draft.ts';
import type { DerivedRecipe } from '../../../../lib/series/station-history.ts';

const STATIONS = [
  { code: '07', name: 'Upper' },
  { code: '08', name: 'Lower' },
  { code: '09', name: 'Twin' },
  { code: '10', name: 'twin' },
];
const read = (...terms: Partial<ReturnType<typeof newTerm>>[]) =>
  readRecipe(
    { quantity: 'flow', note: ' why ', terms: terms.map((term, key) => ({ ...newTerm(key), ...term })) },
    STATIONS,
  );

test('readRecipe takes a station by code, by name, or as offered, and sign, factor and lag apart', () => {
  const { recipe, problems } = read(
    { station: '08' },
    { station: 'upper ', takesAway: true, size: '0.8', lag: '1' },
    { station: '09 – Twin', lag: '−2' },
  );
  expect(problems).toEqual({});
  expect(recipe).toEqual({
    ...{ quantity: 'flow', note: 'why' },
    terms: [
      { code: '08', factor: 1, lagDays: 0 },
      { code: '07', factor: -0.8, lagDays: 1 },
      { code: '09', factor: 1, lagDays: -2 },
    ],
  });
});

test('readRecipe says beside which field what is wrong, and keeps the terms that can be read', () => {
  const { recipe, problems } = read(
    { station: 'Twin' },
    { station: '07', size: '1,5' },
    { station: '07', lag: '1.5' },
    { station: '07', lag: '367' },
    { station: '07', size: '0' },
    { station: '08' },
  );
  expect(Object.keys(problems)).toEqual([
    'terms.0.station',
    'terms.1.size',
    'terms.2.lag',
    'terms.3.lag',
    'terms.4.size',
  ]);
  expect(recipe.terms.map(({ code }) => code)).toContain('08');
  expect(read().problems).toEqual({ terms: 'A derived record comes from at least one station.' });
});

test('recipeDraftOf and readRecipe are inverse to one another', () => {
  const recipe: DerivedRecipe = {
    ...{ quantity: 'stage', note: 'n' },
    terms: [
      { code: '08', factor: -0.25, lagDays: -1 },
      { code: 'gone', factor: 1, lagDays: 0 },
    ],
  };
  const draft = recipeDraftOf(recipe, STATIONS);
  expect(readRecipe(draft, [...STATIONS, { code: 'gone', name: 'Gone' }]).recipe).toEqual(recipe);
  expect(readRecipe(draft, STATIONS).problems).toHaveProperty(['terms.1.station']);
});
