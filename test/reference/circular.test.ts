import { expect, test } from 'vitest';
import { parseIsoDate } from '../../lib/calendar/day.ts';
import { datesOnALine } from '../../lib/lowflow/minimum-dates.ts';
import { circularMean } from '../../lib/statistics/circular.ts';
import { expectReference, referenceCase, referenceCases } from './reference.ts';

interface Input {
  day_of_year?: number[];
  year_length: number;
  dates?: string[];
}
interface Expected {
  r_bar: number;
  mean_angle_rad?: number;
  mean_day?: number;
}

for (const reference of referenceCases<Input, Expected>('circular')) {
  const { day_of_year, year_length } = reference.input;
  if (day_of_year === undefined) continue;
  test(`circularMean gives the ${reference.name}`, () => {
    const { angle, concentration } = circularMean(day_of_year.map((day) => (2 * Math.PI * day) / year_length));
    expectReference(reference, { r_bar: concentration });
    const { mean_angle_rad, mean_day } = reference.expected;
    if (mean_angle_rad !== undefined) expectReference(reference, { mean_angle_rad: angle });
    if (mean_day !== undefined) expectReference(reference, { mean_day: (angle * year_length) / (2 * Math.PI) });
    // opposite dates cancel out, and have no mean
    if (mean_day === undefined) expect(angle).toBeNaN();
  });
}

test('datesOnALine gives mean and concentration of dates with leap years, each over its own year', () => {
  const reference = referenceCase<Input, Expected>('circular', 'dates with leap years, each over its own year length');
  const { meanDay, concentration } = datesOnALine(reference.input.dates!.map(parseIsoDate));
  expectReference(reference, { mean_day_of_365: meanDay, r_bar: concentration });
});
