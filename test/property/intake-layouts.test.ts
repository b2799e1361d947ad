import fc from 'fast-check';
import { expect, test } from 'vitest';
import { dayNumber, daysInMonth, isoDate } from '../../lib/calendar/day.ts';
import type { StagedPart } from '../../lib/intake/types.ts';
import { read } from '../unit/intake/reading.ts';

/** What stands on a day: a number as written, nothing, or a word for missing. */
interface Cell {
  value: string;
  flag: string;
}

const FLAGS = ['', 'A', 'e', 'P'];

/** Cells from a seed: a failure then shrinks to one small number instead of a thousand cells. */
function cellsOf(seed: number, count: number): Cell[] {
  let state = seed >>> 0;
  const next = (below: number): number => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return Math.floor((state / 2 ** 32) * below);
  };
  return Array.from({ length: count }, () => {
    const kind = next(12);
    const value = kind < 3 ? ['', '-999.00', 'NA'][kind] : (next(10_000_000) / 1000).toFixed(next(4));
    return { value, flag: FLAGS[next(FLAGS.length)] };
  });
}

const missing = new Set(['', '-999.00', 'NA']);
const readingOf = (text: string): number => (missing.has(text) ? Number.NaN : Number(text));

/** The days of whole months, each with what stands on it. */
type Days = Map<number, Cell>;

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];
const NUMBERS = MONTHS.map((_, at) => at + 1);
const DATES = Array.from({ length: 31 }, (_, at) => at + 1);

/** Records of a whole number of years, leap years among them. */
const record = fc
  .record({ firstYear: fc.integer({ min: 1860, max: 2090 }), years: fc.integer({ min: 1, max: 3 }), seed: fc.nat() })
  .map(({ firstYear, years, seed }) => {
    const first = dayNumber(firstYear, 1, 1);
    const cells = cellsOf(seed, dayNumber(firstYear + years, 1, 1) - first);
    const days: Days = new Map(cells.map((one, at) => [first + at, one]));
    return { firstYear, years, first, cells, days };
  });

const inMonth = (days: Days, year: number, month: number, date: number): Cell | null =>
  date > daysInMonth(year, month) ? null : (days.get(dayNumber(year, month, date)) ?? null);

/** The fields of one cell; a day that does not exist is empty. */
const fieldsOf = (one: Cell | null, flags: boolean): string[] =>
  flags ? [one?.value ?? '', one?.flag ?? ''] : [one?.value ?? ''];

function expectRead(part: StagedPart, written: { first: number; cells: Cell[] }, flags: boolean): void {
  expect(part.firstDay).toBe(written.first);
  expect([...part.values]).toEqual(written.cells.map(({ value }) => readingOf(value)));
  const texts = written.cells.map(({ value, flag }) => (flags && flag ? flag : missing.has(value) ? value : ''));
  expect([...part.codes].map((code) => part.codeList[code].text)).toEqual(texts);
}

const yearsOf = ({ firstYear, years }: { firstYear: number; years: number }): number[] =>
  Array.from({ length: years }, (_, at) => firstYear + at);

const delimiters = fc.constantFrom(',', ';', '\t');
const heading = (texts: string[], flags: boolean): string[] =>
  flags ? texts.flatMap((text) => [text, `F${text}`]) : texts;

test('what is written a row a month is read back, value for value and flag for flag', async () => {
  await fc.assert(
    fc.asyncProperty(
      ...([record, delimiters, fc.boolean(), fc.boolean()] as const),
      fc.constantFrom('columns', 'one column', 'names'),
      async (written, delimiter, flags, summary, style) => {
        const dateOf = (year: number, month: number): string[] => {
          if (style === 'one column') return [`${year}-${String(month).padStart(2, '0')}`];
          return [String(year), style === 'names' ? MONTHS[month - 1] : String(month)];
        };
        const rows = yearsOf(written).flatMap((year) =>
          NUMBERS.map((month) => [
            ...['0042', ...dateOf(year, month)],
            ...DATES.flatMap((date) => fieldsOf(inMonth(written.days, year, month, date), flags)),
            ...(summary ? ['7.5', '1'] : []),
          ]),
        );
        const names = style === 'one column' ? ['month'] : ['year', 'month'];
        const header = ['station', ...names, ...heading(DATES.map(String), flags), ...(summary ? ['Mean', 'Min'] : [])];
        const text = [header, ...rows].map((row) => row.join(delimiter)).join('\n');
        const { report, parts } = await read(`${text}\n`, { unit: 'm3/s' });
        expect(report).toMatchObject({ layout: 'month-rows', rows: rows.length, accepted: rows.length, rejected: [] });
        expect(parts.map(({ code }) => code)).toEqual(['0042']);
        expectRead(parts[0], written, flags);
        // The mapping that the report names reads the same.
        expect((await read(text, { mapping: report.mapping })).parts).toEqual(parts);
      },
    ),
    { numRuns: 40 },
  );
});

test('what is written a row a day, in blocks of a year, is read back', async () => {
  await fc.assert(
    fc.asyncProperty(
      ...([record, delimiters, fc.boolean(), fc.boolean()] as const),
      fc.constantFrom('Year ', '', 'Jahr: ', 'column'),
      async (written, delimiter, flags, totals, style) => {
        const blocks = yearsOf(written).flatMap((year) => {
          const rows = DATES.map((date) => [
            ...(style === 'column' ? [String(year)] : []),
            String(date),
            ...NUMBERS.flatMap((month) => fieldsOf(inMonth(written.days, year, month, date), flags)),
          ]);
          const header = [...(style === 'column' ? ['year'] : []), 'day', ...heading(MONTHS, flags)];
          const total = totals ? [['Total', ...heading(MONTHS, flags).map(() => '9')]] : [];
          return [...(style === 'column' ? [] : [[`${style}${year}`]]), header, ...rows, ...total];
        });
        const text = blocks.map((row) => row.join(delimiter)).join('\n');
        const { report, parts } = await read(text, { unit: 'm3/s', station: 'S1' });
        const rows = written.years * 31;
        expect(report).toMatchObject({ layout: 'day-rows', rows, accepted: rows, rejected: [] });
        expectRead(parts[0], written, flags);
        expect((await read(text, { mapping: report.mapping })).parts).toEqual(parts);
      },
    ),
    { numRuns: 40 },
  );
});

test('what is written a row a day in right-aligned columns, empty cells blank, is read back', async () => {
  await fc.assert(
    fc.asyncProperty(record, fc.integer({ min: 9, max: 12 }), async (written, width) => {
      const line = (fields: string[]) =>
        fields
          .map((field, at) => field.padStart(at === 0 ? 4 : width))
          .join('')
          .trimEnd();
      // Cells of a full row, as agencies fill them, so that the columns show; elsewhere any.
      const full = new Map(written.days);
      for (const year of yearsOf(written)) {
        for (const month of NUMBERS) full.set(dayNumber(year, month, 1), { value: '1.5', flag: '' });
      }
      const cells = written.cells.map((_, at) => full.get(written.first + at) as Cell);
      const blocks = yearsOf(written).flatMap((year) => [
        `Year ${year}`,
        line(['day', ...MONTHS]),
        ...DATES.map((date) =>
          line([String(date), ...NUMBERS.map((month) => inMonth(full, year, month, date)?.value ?? '')]),
        ),
      ]);
      const { report, parts } = await read(blocks.join('\n'), { unit: 'm3/s' });
      const rows = written.years * 31;
      expect(report).toMatchObject({ layout: 'day-rows', rows, accepted: rows, rejected: [] });
      expectRead(parts[0], { first: written.first, cells }, false);
    }),
    { numRuns: 30 },
  );
});

/** How a number is written with signs between thousands: 1234567.5 → "1,234,567.5". */
function grouped(value: number, thousands: string, decimal: string): string {
  const [whole, part] = String(value).split('.');
  return whole.replace(/(?<=\d)(?=(?:\d{3})+$)/g, thousands) + (part === undefined ? '' : decimal + part);
}

const daily = fc.record({
  first: fc.integer({ min: dayNumber(1930, 1, 1), max: dayNumber(2029, 1, 1) }),
  values: fc.array(
    fc.nat(2_000_000_000).map((n) => n / 100),
    { minLength: 40, maxLength: 80 },
  ),
});

function namedDate(style: string, day: number): string {
  const [year, month, date] = isoDate(day).split('-').map(Number);
  const name = MONTHS[month - 1];
  if (style === 'day first') return `${date}-${name}-${year}`;
  if (style === 'month first') return `${name} ${date} ${year}`;
  if (style === 'short year') return `${date}-${name}-${String(year % 100).padStart(2, '0')}`;
  return `${year} ${name} ${date}`;
}

test('what is written under a block of lines, with months by name and groups of thousands, is read back', async () => {
  await fc.assert(
    fc.asyncProperty(
      daily,
      fc.constantFrom('#', '//', '%', ''),
      fc.constantFrom('day first', 'month first', 'year first', 'short year'),
      fc.constantFrom([',', '.'], ['.', ','], [' ', '.'], ["'", '.']),
      async ({ first, values }, sign, style, [thousands, decimal]) => {
        const written = [...values, 1_234_567.5];
        const rows = written.map(
          (value, at) => `${namedDate(style, first + at)};${grouped(value, thousands, decimal)}`,
        );
        const block = ['Station number: 0017', 'River: Mill Brook', 'Units: ML/day'].map((text) => `${sign}${text}`);
        const text = [...block, 'date;flow', ...rows].join('\n');
        const { report, parts } = await read(text, style === 'short year' ? { mapping: { firstYear: 1930 } } : {});
        expect(report).toMatchObject({ unit: 'ML/d', rows: rows.length, accepted: rows.length, rejected: [] });
        expect(report.mapping).toMatchObject({ thousands, decimal, station: { from: 'lines-above' } });
        expect(report.facts).toEqual([{ code: '0017', river: 'Mill Brook' }]);
        expect(parts[0].firstDay).toBe(first);
        expect([...parts[0].values]).toEqual(written);
      },
    ),
    { numRuns: 60 },
  );
});

test('a cell of a day that does not exist is never taken, whatever number stands there', async () => {
  await fc.assert(
    fc.asyncProperty(
      fc.integer({ min: 1800, max: 2100 }),
      fc.constantFrom(2, 4, 6, 9, 11),
      fc.nat(99_999).map((n) => String(n / 10)),
      async (year, month, value) => {
        const rows = [1, month].map((number) => [
          ...[String(year), String(number)],
          ...DATES.map((date) => (number === month || date <= daysInMonth(year, number) ? value : '')),
        ]);
        const text = [['year', 'month', ...DATES], ...rows].map((row) => row.join(',')).join('\n');
        const { report, parts, rejected } = await read(text, { unit: 'm3/s' });
        const days = [...parts[0].codes].filter((code) => code !== 255).length;
        expect(days).toBe(31 + daysInMonth(year, month));
        expect(report).toMatchObject({ rows: 2, accepted: 1, rejectedTotal: 1 });
        const surplus = 31 - daysInMonth(year, month);
        expect(rejected[0].reason.match(/is no day of the calendar/g)).toHaveLength(surplus);
      },
    ),
    { numRuns: 40 },
  );
});
