import { describe, expect, test } from 'vitest';
import { annualIndex, deficitVolume, type RecordIndex } from '../../../lib/lowflow/annual-index.ts';
import { annualMinima, type MinimaOptions } from '../../../lib/lowflow/annual-minima.ts';
import { smoothedMinimaBaseflow, turningPoints } from '../../../lib/lowflow/baseflow.ts';
import type { DailySeries } from '../../../lib/series/daily-series.ts';
import { seriesOf, withFlag, withGap } from '../series-of.ts';

const OPTIONS: MinimaOptions = { yearStart: 1, season: null, days: 7, maxMissingDays: 18, exclude: ['provisional'] };
const indexOf = (series: DailySeries, index: RecordIndex, options = OPTIONS) =>
  Array.from(annualIndex(series, annualMinima(series, options), index, options));

/** 2001 and 2002, 365 days each: the n-th day of each year has the flow n, in m³/s. */
const counting = seriesOf([2001, 1, 1], { days: 730, flow: (i) => (i % 365) + 1 });

describe('annualIndex q95', () => {
  test('is the flow at rank 0.05 · (n + 1): 366 · 0.05 = 18.3 of the flows 1 to 365', () => {
    expect(indexOf(counting, 'q95')).toEqual([18.3, 18.3]);
  });

  test('is of the season alone where the basis has one', () => {
    // September has the flows 244 to 273: 31 · 0.05 = 1.55
    expect(indexOf(counting, 'q95', { ...OPTIONS, season: [9, 9] })).toEqual([244.55, 244.55]);
  });

  test('leaves missing, rejected and excluded days out, and years that are not usable', () => {
    const flagged = withFlag(counting, 'provisional', 355, 364);
    // 355 flows are left in the first year: 356 · 0.05 = 17.8
    expect(indexOf(flagged, 'q95')).toEqual([17.8, 18.3]);
    expect(indexOf(withGap(counting, 100, 140), 'q95')).toEqual([Number.NaN, 18.3]);
  });

  test('is none where so few days say nothing of it: 18 days reach no rank 1', () => {
    const short = seriesOf([2001, 1, 1], { days: 18, flow: () => 2 });
    expect(indexOf(short, 'q95', { ...OPTIONS, maxMissingDays: 365 })).toEqual([Number.NaN]);
  });
});

describe('annualIndex bfi', () => {
  test('of a constant flow is 1, and 0.8 of the days must have a baseflow', () => {
    const constant = seriesOf([2001, 1, 1], { days: 730, flow: () => 3 });
    expect(indexOf(constant, 'bfi')).toEqual([1, 1]);
    // one year alone loses a block at each end and still has 355 of 365 days
    expect(indexOf(seriesOf([2001, 1, 1], { days: 365, flow: () => 3 }), 'bfi')).toEqual([1]);
    // gaps every three weeks cost two blocks each, and most of the year
    let broken = constant;
    for (let day = 10; day < 365; day += 21) broken = withGap(broken, day, day);
    expect(indexOf(broken, 'bfi')).toEqual([Number.NaN, 1]);
  });

  test('of floods over a steady flow is the steady flow over all flow', () => {
    // 1 m³/s, every tenth day 11: 2 m³/s in the mean, half of it baseflow
    const flooded = seriesOf([2001, 1, 1], { days: 1095, flow: (i) => (i % 10 === 7 ? 11 : 1) });
    expect(indexOf(flooded, 'bfi')[1]).toBeCloseTo(365 / (365 + 10 * 37), 1);
  });

  test('of a river without flow is none', () => {
    expect(indexOf(seriesOf([2001, 1, 1], { days: 365, flow: () => 0 }), 'bfi')).toEqual([Number.NaN]);
  });
});

describe('annualIndex deficit', () => {
  test('is what the days lack to the Q90 of all usable years', () => {
    // each flow twice: 730 flows, 731 · 0.1 = 73.1, so Q90 is 37; the days 1 to 36 lack 36 + 35 + … + 1 = 666 m³/s
    expect(indexOf(counting, 'deficit')).toEqual([666 * 86_400, 666 * 86_400]);
  });

  test('the Q90 is not that of years that are not usable', () => {
    const wetterHalf = seriesOf([2001, 1, 1], { days: 730, flow: (i) => (i < 365 ? i + 1 : 1000 + i) });
    const [, second] = indexOf(withGap(wetterHalf, 0, 60), 'deficit');
    // of 1,365 to 1,729 alone: 366 · 0.1 = 36.6, Q90 is 1,400.6, and 36 days lie 0.6 to 35.6 below
    expect(second).toBeCloseTo((36 * (0.6 + 35.6) * 86_400) / 2, 3);
  });

  test('deficitVolume takes a day at the threshold for none, and a missing one for nothing', () => {
    expect(deficitVolume(Float64Array.of(2, 1.5, Number.NaN, 3), 2)).toBe(0.5 * 86_400);
    expect(deficitVolume(Float64Array.of(2), Number.NaN)).toBeNaN();
    expect(deficitVolume(new Float64Array(), 2)).toBe(0);
  });
});

test('annualIndex of a record without values has no years', () => {
  for (const index of ['q95', 'bfi', 'deficit'] as const) {
    expect(indexOf(seriesOf([2001, 1, 1], []), index)).toEqual([]);
    expect(indexOf(seriesOf([2001, 1, 1], { days: 400, flow: () => Number.NaN }), index)).toEqual([]);
  }
});

test('smoothedMinimaBaseflow begins anew after a gap, on blocks of its own', () => {
  const flow = Float64Array.from({ length: 61 }, (_, i) => (i === 30 ? Number.NaN : 2));
  const base = smoothedMinimaBaseflow(flow);
  // stretches of 30 days, six blocks each, of which the first and the last are no turning points
  expect(turningPoints(flow, 31, 61)).toEqual([36, 41, 46, 51]);
  const known = Array.from(base.keys()).filter((i) => !Number.isNaN(base[i]));
  expect(known).toEqual([...range(5, 20), ...range(36, 51)]);
});

const range = (from: number, to: number) => Array.from({ length: to - from + 1 }, (_, i) => from + i);
