import { expect, test } from 'vitest';
import { dayNumber } from '../../../lib/calendar/day.ts';
import { flatRuns } from '../../../lib/checks/flat-runs.ts';
import { futureDates } from '../../../lib/checks/future-dates.ts';
import { negativeFlows } from '../../../lib/checks/negative-flows.ts';
import { tooLargeFlows } from '../../../lib/checks/too-large-flows.ts';
import { seriesOf } from '../series-of.ts';

const START: [number, number, number] = [2001, 1, 1];
const first = dayNumber(...START);
const of = (...flows: number[]) => seriesOf(START, flows);
const NONE = Number.NaN;

test('negativeFlows finds each stretch, to the record’s ends, and a missing day parts two', () => {
  expect(negativeFlows(of(-1, -3, 0, 2, -0.5, NONE, -2))).toEqual([
    { kind: 'negative', firstDay: first, lastDay: first + 1, days: 2, detail: { lowest: -3 } },
    { kind: 'negative', firstDay: first + 4, lastDay: first + 4, days: 1, detail: { lowest: -0.5 } },
    { kind: 'negative', firstDay: first + 6, lastDay: first + 6, days: 1, detail: { lowest: -2 } },
  ]);
  expect(negativeFlows(of(0, -0, NONE, 1e-12))).toEqual([]);
  expect(negativeFlows(of())).toEqual([]);
});

test('tooLargeFlows: below, at and above 30 m³/s/km²', () => {
  const found = tooLargeFlows(of(59.9, 60, 60.1, 90, 1), 2);
  expect(found).toEqual([
    {
      ...{ kind: 'too-large', firstDay: first + 2, lastDay: first + 3, days: 2 },
      detail: { highest: 90, specific: 45, limit: 30 },
    },
  ]);
  for (const areaKm2 of [null, 0, NONE]) expect(tooLargeFlows(of(1e9), areaKm2)).toEqual([]);
});

test('futureDates: yesterday and today are none, tomorrow is; days without a value do not count', () => {
  const series = of(1, 2, 3, NONE, 5, NONE);
  expect(futureDates(series, first + 4)).toEqual([]);
  expect(futureDates(series, first + 1)).toEqual([
    { kind: 'future', firstDay: first + 2, lastDay: first + 4, days: 2, detail: { today: '2001-01-02' } },
  ]);
  expect(futureDates(series, first - 100)[0]).toMatchObject({ firstDay: first, days: 4 });
});

test('flatRuns: nine equal days are none, ten are, zeros never; gaps part runs', () => {
  const run = (value: number, days: number) => new Array<number>(days).fill(value);
  expect(flatRuns(of(1, ...run(2, 9), 3))).toEqual([]);
  expect(flatRuns(of(1, ...run(2, 10), 3))).toEqual([
    ...[{ kind: 'flat', firstDay: first + 1, lastDay: first + 10, days: 10, detail: { value: 2, share: 10 / 12 } }],
  ]);
  expect(flatRuns(of(...run(0, 30)))).toEqual([]);
  expect(flatRuns(of(...run(2, 6), NONE, ...run(2, 6)))).toEqual([]);
  expect(flatRuns(of(...run(NONE, 30)))).toEqual([]);
  expect(flatRuns(of(...run(2, 12), ...run(3, 12))).map(({ detail }) => detail)).toEqual([
    { value: 2, share: 1 },
    { value: 3, share: 1 },
  ]);
});
