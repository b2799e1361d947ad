import { expect, test } from 'vitest';
import { isoDate, parseIsoDate } from '../../lib/calendar/day.ts';
import { annualMinima } from '../../lib/lowflow/annual-minima.ts';
import { expectReference, referenceCases } from './reference.ts';

interface Input {
  x: number[];
  start: string;
  n: number;
  year_starts_in_month: number;
}
interface Expected {
  year_beginning: number[];
  minimum: number[];
  last_day_of_window: string[];
}

for (const reference of referenceCases<Input, Expected>('nday-minima')) {
  test(`annualMinima gives the ${reference.name}`, () => {
    const { x, start, n, year_starts_in_month } = reference.input;
    const series = { firstDay: parseIsoDate(start), values: Float64Array.from(x), flags: new Uint8Array(x.length) };
    const minima = annualMinima(series, {
      yearStart: year_starts_in_month,
      season: null,
      days: n,
      maxMissingDays: 0,
      exclude: [],
    });
    const usable = Array.from(minima.years.keys()).filter((i) => minima.usable[i] === 1);
    expectReference(reference, {
      year_beginning: usable.map((i) => minima.years[i]),
      minimum: usable.map((i) => minima.minimum[i]),
    });
    expect(usable.map((i) => isoDate(minima.day[i]))).toEqual(reference.expected.last_day_of_window);
  });
}
