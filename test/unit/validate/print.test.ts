import { describe, expect, test } from 'vitest';
import type { SimulatedFigure } from '../../../lib/region/simulated-figures.ts';
import { figureOf, isAsMeant, type Scenario } from '../../validate/figure.ts';
import { figuresTable, withTable } from '../../validate/print.ts';

const figure = (keys: Partial<SimulatedFigure>): SimulatedFigure => ({
  ...{ claim: 'false-alarms', of: 'ar1', setting: 'lag-1 0', value: 0.041, error: 0.003, cases: 4000, aim: null },
  ...keys,
});

describe('figureOf', () => {
  test('is the mean of the cases with its standard error', () => {
    const scenario: Scenario = {
      claim: 'c',
      of: 'o',
      setting: 's',
      cases: 4,
      run: (size) => [0, 1, 0, 1].slice(0, size),
    };
    // variance 1/3 over n − 1, so √(1/3/4)
    expect(figureOf(scenario)).toEqual({
      ...{ claim: 'c', of: 'o', setting: 's', value: 0.5, error: 0.2887, cases: 4, aim: null },
    });
    expect(figureOf(scenario, 2).cases).toBe(2);
  });
});

describe('isAsMeant', () => {
  test.each([
    [0.055, 0.003, true],
    [0.061, 0.003, true],
    [0.0611, 0.003, false],
  ])('%d ± %d against at most 5.5 %%: %s', (value, error, meant) => {
    expect(isAsMeant(figure({ value, error, aim: [null, 0.055] }))).toBe(meant);
  });

  test('a figure without an aim is as meant', () => {
    expect(isAsMeant(figure({ value: 1 }))).toBe(true);
  });
});

test('figuresTable: a table a claim, methods down, settings across, an empty cell where nothing was simulated', () => {
  const table = figuresTable([
    figure({ aim: [null, 0.055] }),
    figure({ setting: 'lag-1 0.3', value: 0.1, aim: [null, 0.075] }),
    figure({ of: 'none' }),
    figure({ claim: 'other', of: 'x', setting: 'y', value: 0.5 }),
  ]);
  expect(table.split('\n')).toEqual([
    '| finds a trend where there is none, at a nominal 5 % | lag-1 0 | lag-1 0.3 |',
    '|---|---|---|',
    '| ar1 | 4.1 % ± 0.3 (at most 5.5 % ✓) | 10.0 % ± 0.3 (at most 7.5 % ✗) |',
    '| none | 4.1 % ± 0.3 |  |',
    '',
    '| other | y |',
    '|---|---|',
    '| x | 50.0 % ± 0.3 |',
  ]);
});

test('withTable puts the table between its marks, again and again, and refuses a text without them', () => {
  const text =
    'a\n<!-- simulated figures: written by npm run validate -- --write -->\nold\n<!-- end of simulated figures -->\nz\n';
  const once = withTable(text, 'T');
  expect(once).toContain('-->\n\nT\n\n<!-- end');
  expect(once).not.toContain('old');
  expect(withTable(once, 'T')).toBe(once);
  expect(() => withTable('nothing', 'T')).toThrow(RangeError);
});
