import { expect, test } from 'vitest';
import { parseIsoDate } from '../../lib/calendar/day.ts';
import { annualIndex, deficitVolume } from '../../lib/lowflow/annual-index.ts';
import { annualMinima } from '../../lib/lowflow/annual-minima.ts';
import { expectReference, referenceCase, referenceCases } from './reference.ts';

const CALENDAR_YEARS = { yearStart: 1, season: null, days: 7, maxMissingDays: 18, exclude: [] };

test('annualIndex gives Q95, baseflow index and deficit volume of each year', () => {
  const reference = referenceCase<{ x: number[]; start: string }, object>('annual-index', 'daily-3yr');
  const { x, start } = reference.input;
  const series = { firstDay: parseIsoDate(start), values: Float64Array.from(x), flags: new Uint8Array(x.length) };
  const minima = annualMinima(series, CALENDAR_YEARS);
  expectReference(reference, {
    years: minima.years,
    q95: annualIndex(series, minima, 'q95', CALENDAR_YEARS),
    bfi: annualIndex(series, minima, 'bfi', CALENDAR_YEARS),
    deficit: annualIndex(series, minima, 'deficit', CALENDAR_YEARS),
  });
});

interface Events {
  threshold_flow?: number;
  deficit_volume_m3: number[];
}

for (const { name, input, expected } of referenceCases<{ x: number[]; threshold_flow?: number }, Events>(
  'deficit-volumes',
)) {
  test(`deficitVolume adds up to that of all events of ${name}`, () => {
    const threshold = input.threshold_flow ?? expected.threshold_flow!;
    const total = expected.deficit_volume_m3.reduce((sum, volume) => sum + volume, 0);
    expect(deficitVolume(Float64Array.from(input.x), threshold)).toBeCloseTo(total, 2);
  });
}
