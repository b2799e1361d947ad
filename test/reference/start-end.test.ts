import { expect, test } from 'vitest';
import { DEFAULT_BASIS } from '../../lib/basis.ts';
import { startEnd } from '../../lib/region/start-end.ts';
import { expectReference, referenceCases } from './reference.ts';

type Input = { years: number[]; values: number[]; window?: [number, number] };

for (const reference of referenceCases<Input, object>('start-end')) {
  test(`startEnd gives the figures of ${reference.name}`, () => {
    const { years, values, window } = reference.input;
    const row = { code: 'R', years, values, trendOf: 'minima', r1: null, serialFactor: 1 } as const;
    const asked = { period: null, yearStart: 1 } as const;
    const chart = startEnd(row, { ...DEFAULT_BASIS, serialCorrection: 'none', period: null, yearStart: 1, asked });
    if (!window) {
      expectReference(reference, { windows: chart.windows, steadiness: chart.steadiness! });
      return;
    }
    const [i, j] = [chart.starts.indexOf(window[0]), chart.ends.indexOf(window[1])];
    expect(Math.min(i, j)).toBeGreaterThanOrEqual(0);
    const cell = i * chart.ends.length + j;
    const { z, p, slopePerDecade, percentPerDecade } = chart;
    expectReference(reference, {
      z: z[cell],
      p: p[cell],
      slopePerDecade: slopePerDecade[cell],
      percentPerDecade: percentPerDecade[cell],
    });
  });
}
