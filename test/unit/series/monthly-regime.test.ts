import { expect, test } from 'vitest';
import { dateOfDay } from '../../../lib/calendar/day.ts';
import { monthlyRegime } from '../../../lib/series/monthly-regime.ts';
import { seriesOf, withFlag, withGap } from '../series-of.ts';

const byMonth = (flow: (month: number) => number, days = 1461) => {
  const series = seriesOf([2001, 1, 1], { days, flow: () => 0 });
  return { ...series, values: series.values.map((_, i) => flow(dateOfDay(series.firstDay + i).month)) };
};

test('monthlyRegime divides each month’s mean by the mean of the monthly means', () => {
  const regime = monthlyRegime(
    byMonth((month) => month),
    [],
  );
  expect(regime).toHaveLength(12);
  for (let i = 0; i < 12; i += 1) expect(regime[i]).toBeCloseTo((i + 1) / 6.5, 12);
});

test('monthlyRegime does not let gaps or excluded days move a month', () => {
  const gappy = withFlag(
    withGap(
      byMonth((month) => month),
      40,
      45,
    ),
    'provisional',
    100,
    110,
  );
  const regime = monthlyRegime(gappy, ['provisional']);
  for (let i = 0; i < 12; i += 1) expect(regime[i]).toBeCloseTo((i + 1) / 6.5, 12);
});

test('monthlyRegime has NaN for months never seen, and for every month of a river that never flows', () => {
  const springOnly = monthlyRegime(
    byMonth(() => 2, 59),
    [],
  );
  expect([...springOnly]).toEqual([1, 1, ...new Array(10).fill(Number.NaN)]);
  expect([
    ...monthlyRegime(
      byMonth(() => 0),
      [],
    ),
  ]).toEqual(new Array(12).fill(Number.NaN));
  expect([...monthlyRegime(seriesOf([2000, 1, 1], []), [])]).toEqual(new Array(12).fill(Number.NaN));
});
