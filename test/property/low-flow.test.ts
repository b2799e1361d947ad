import fc from 'fast-check';
import { expect, test } from 'vitest';
import { dateOfDay, dayNumber, isoDate, parseIsoDate } from '../../lib/calendar/day.ts';
import { firstDayOfLowFlowYear, lowFlowYearOfDay } from '../../lib/calendar/low-flow-year.ts';
import { seasonSpan } from '../../lib/calendar/season.ts';
import { durationCurve, flowAtExceedance } from '../../lib/curves/duration-curve.ts';
import { annualMinima } from '../../lib/lowflow/annual-minima.ts';
import type { DailySeries } from '../../lib/series/daily-series.ts';
import { rollingMean } from '../../lib/series/moving-average.ts';
import { roundSignificant } from '../../lib/series/round-significant.ts';
import { sortAscending } from '../../lib/series/sort-ascending.ts';
import { quantileType6 } from '../../lib/statistics/quantile.ts';

/** 1600-01-01 to 2400-12-31. */
const day = fc.integer({ min: dayNumber(1600, 1, 1), max: dayNumber(2400, 12, 31) });
const month = fc.integer({ min: 1, max: 12 });

/** Flows with two decimals, many ties and zeros, and gaps. */
const flow = fc.oneof(
  { weight: 8, arbitrary: fc.integer({ min: 0, max: 400 }).map((hundredths) => hundredths / 100) },
  { weight: 2, arbitrary: fc.constant(0) },
  { weight: 1, arbitrary: fc.constant(Number.NaN) },
);
/** Up to two and a half years, drawn in stretches so that whole gaps and dry spells occur. */
const series: fc.Arbitrary<DailySeries> = fc
  .record({
    firstDay: day,
    stretches: fc.array(fc.tuple(flow, fc.integer({ min: 1, max: 40 })), { minLength: 1, maxLength: 50 }),
    noise: fc.array(flow, { minLength: 7, maxLength: 7 }),
  })
  .map(({ firstDay, stretches, noise }) => {
    const values = stretches.flatMap(([base, length], k) =>
      Array.from({ length }, (_, i) => (k % 3 === 0 ? base : base + noise[(k + i) % 7])),
    );
    return { firstDay, values: Float64Array.from(values), flags: new Uint8Array(values.length) };
  });

test('dayNumber and dateOfDay agree with the engine’s own calendar, 1600 to 2400', () => {
  fc.assert(
    fc.property(day, (number) => {
      const engine = new Date(number * 86_400_000);
      const date = dateOfDay(number);
      expect(date).toEqual({
        year: engine.getUTCFullYear(),
        month: engine.getUTCMonth() + 1,
        day: engine.getUTCDate(),
      });
      expect(dayNumber(date.year, date.month, date.day)).toBe(number);
      expect(isoDate(number)).toBe(engine.toISOString().slice(0, 10));
      expect(parseIsoDate(isoDate(number))).toBe(number);
    }),
    { numRuns: 3000 },
  );
});

test('every day from 1600 to 2400 follows the day before', () => {
  let { year, month: monthOfYear, day: dayOfMonth } = dateOfDay(dayNumber(1600, 1, 1));
  for (let number = dayNumber(1600, 1, 2); number <= dayNumber(2400, 12, 31); number += 1) {
    const next = dateOfDay(number);
    const stepped = next.day === dayOfMonth + 1 && next.month === monthOfYear && next.year === year;
    const turned = next.day === 1 && dayOfMonth >= 28 && (next.month === monthOfYear + 1 || next.year === year + 1);
    if (!stepped && !turned) throw new Error(`${number} is ${JSON.stringify(next)}`);
    ({ year, month: monthOfYear, day: dayOfMonth } = next);
  }
  expect([year, monthOfYear, dayOfMonth]).toEqual([2400, 12, 31]);
});

test('a day lies between the first day of its low-flow year and that of the next', () => {
  fc.assert(
    fc.property(day, month, (number, startMonth) => {
      const year = lowFlowYearOfDay(number, startMonth);
      expect(firstDayOfLowFlowYear(year, startMonth)).toBeLessThanOrEqual(number);
      expect(firstDayOfLowFlowYear(year + 1, startMonth)).toBeGreaterThan(number);
    }),
  );
});

test('a season lies inside its low-flow year and runs from month to month', () => {
  fc.assert(
    fc.property(fc.integer({ min: 1600, max: 2400 }), month, month, month, (year, startMonth, a, b) => {
      const place = (each: number) => (each - startMonth + 12) % 12;
      const [from, to] = place(a) <= place(b) ? [a, b] : [b, a];
      const { first, last } = seasonSpan(year, startMonth, [from, to]);
      const whole = seasonSpan(year, startMonth, null);
      expect(whole.first <= first && first <= last && last <= whole.last).toBe(true);
      expect([dateOfDay(first).month, dateOfDay(first).day]).toEqual([from, 1]);
      expect([dateOfDay(last).month, dateOfDay(last + 1).day]).toEqual([to, 1]);
    }),
  );
});

/** Annual minima written down as they are defined, one window after another. */
function naiveMinima(record: DailySeries, yearStart: number, days: number) {
  const result = new Map<number, { minimum: number; day: number; complete: number }>();
  for (let i = 0; i + days <= record.values.length; i += 1) {
    const year = lowFlowYearOfDay(record.firstDay + i, yearStart);
    if (lowFlowYearOfDay(record.firstDay + i + days - 1, yearStart) !== year) continue;
    const window = [...record.values.subarray(i, i + days)];
    if (window.some(Number.isNaN)) continue;
    const mean = roundSignificant(window.reduce((sum, value) => sum + value, 0) / days, 10);
    const found = result.get(year) ?? { minimum: Number.POSITIVE_INFINITY, day: -1, complete: 0 };
    found.complete += 1;
    if (mean < found.minimum) Object.assign(found, { minimum: mean, day: record.firstDay + i + days - 1 });
    result.set(year, found);
  }
  return result;
}

test('annualMinima agrees with the definition written out, gaps included', () => {
  fc.assert(
    fc.property(series, month, fc.constantFrom(1, 2, 7, 30, 90, 200), (record, yearStart, days) => {
      const minima = annualMinima(record, { yearStart, season: null, days, maxMissingDays: 365, exclude: [] });
      const naive = naiveMinima(record, yearStart, days);
      minima.years.forEach((year, i) => {
        const expected = naive.get(year);
        expect(minima.minimum[i]).toBe(expected?.minimum ?? Number.NaN);
        expect(minima.day[i]).toBe(expected?.day ?? -1);
        const yearDays = firstDayOfLowFlowYear(year + 1, yearStart) - firstDayOfLowFlowYear(year, yearStart);
        const windows = yearDays - days + 1;
        const lost = windows - (expected?.complete ?? 0);
        expect(minima.reason[i].includes('windows lost')).toBe(lost > windows / 10);
      });
      for (const year of naive.keys()) expect(minima.years).toContain(year);
    }),
    { numRuns: 300 },
  );
});

test('annualMinima: no complete n-day window of the year is below the minimum', () => {
  fc.assert(
    fc.property(series, month, fc.integer({ min: 1, max: 60 }), (record, yearStart, days) => {
      const minima = annualMinima(record, { yearStart, season: null, days, maxMissingDays: 18, exclude: [] });
      const means = rollingMean(record.values, days);
      means.forEach((mean, i) => {
        const last = record.firstDay + i;
        const year = lowFlowYearOfDay(last, yearStart);
        if (Number.isNaN(mean) || lowFlowYearOfDay(last - days + 1, yearStart) !== year) return;
        expect(roundSignificant(mean, 10)).toBeGreaterThanOrEqual(minima.minimum[year - minima.years[0]]);
      });
    }),
    { numRuns: 200 },
  );
});

test('annualMinima: taking days away never lowers a minimum', () => {
  fc.assert(
    fc.property(series, fc.nat(), fc.integer({ min: 1, max: 30 }), (record, at, length) => {
      const options = { yearStart: 4, season: null, days: 7, maxMissingDays: 18, exclude: [] };
      const from = at % record.values.length;
      const gappy = { ...record, values: record.values.slice().fill(Number.NaN, from, from + length) };
      const [whole, part] = [annualMinima(record, options), annualMinima(gappy, options)];
      part.years.forEach((year, i) => {
        const before = whole.minimum[year - whole.years[0]];
        if (!Number.isNaN(part.minimum[i])) expect(part.minimum[i]).toBeGreaterThanOrEqual(before);
      });
    }),
  );
});

test('rollingMean is exactly 0 just where all its days are 0', () => {
  fc.assert(
    fc.property(series, fc.integer({ min: 1, max: 100 }), (record, days) => {
      rollingMean(record.values, days).forEach((mean, i) => {
        if (i < days - 1) return;
        const window = record.values.subarray(i - days + 1, i + 1);
        expect(mean === 0).toBe(window.every((value) => value === 0));
      });
    }),
  );
});

test('flowAtExceedance never rises with p and stays within the record', () => {
  fc.assert(
    fc.property(
      series,
      fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { maxLength: 40 }),
      (record, probabilities) => {
        const curve = durationCurve(record.values);
        const flows = probabilities
          .sort((a, b) => a - b)
          .map((p) => flowAtExceedance(curve, p))
          .filter((value) => !Number.isNaN(value));
        flows.forEach((value, i) => {
          expect(value).toBeLessThanOrEqual(i === 0 ? curve.sorted[0] : flows[i - 1] + 1e-12);
          expect(value).toBeGreaterThanOrEqual(curve.sorted[curve.n - 1]);
        });
      },
    ),
  );
});

test('flowAtExceedance(p) is the type-6 quantile at 1 − p', () => {
  fc.assert(
    fc.property(series, fc.double({ min: 0.001, max: 0.999, noNaN: true }), (record, p) => {
      const curve = durationCurve(record.values);
      const flow = flowAtExceedance(curve, p);
      if (Number.isNaN(flow)) return;
      expect(flow).toBeCloseTo(quantileType6(sortAscending(record.values), 1 - p), 9);
    }),
  );
});

test('sortAscending agrees with Array.sort for any numbers', () => {
  fc.assert(
    fc.property(fc.float64Array({ minLength: 0, maxLength: 1500 }), (values) => {
      const expected = [...values].filter((value) => !Number.isNaN(value)).sort((a, b) => a - b);
      // Array.sort takes −0 and 0 as equal and keeps their order: compared as values, which are the same.
      expect([...sortAscending(values)].map((value) => value + 0)).toEqual(expected.map((value) => value + 0));
    }),
  );
});
