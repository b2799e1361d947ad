import fc from 'fast-check';
import { expect, test } from 'vitest';
import { isoDate } from '../../lib/calendar/day.ts';
import { inspectFile } from '../../lib/intake/inspect-file.ts';
import { parseDecimal } from '../../lib/intake/numbers.ts';
import { readLayer } from '../../lib/intake/read-layer.ts';
import { readRegistry } from '../../lib/intake/read-registry.ts';
import { IntakeError } from '../../lib/intake/types.ts';
import { daysOf, read, withFile } from '../unit/intake/reading.ts';

const decimal = fc.oneof(
  fc.tuple(fc.nat(999_999), fc.nat(999_999)).map(([whole, part]) => `${whole}.${part}`),
  fc.double({ noNaN: true, noDefaultInfinity: true }).map(String),
  fc.bigInt({ min: 0n, max: 10n ** 25n }).map(String),
  fc.tuple(fc.stringMatching(/^[+-]?[0-9]{0,18}$/), fc.stringMatching(/^[0-9]{1,25}$/)).map(([a, b]) => `${a}.${b}`),
);

test('parseDecimal equals Number on every finite decimal text', () => {
  fc.assert(
    fc.property(decimal, (text) => {
      const bytes = new TextEncoder().encode(text);
      expect(parseDecimal(bytes, 0, bytes.length, 46)).toBe(Number(text));
    }),
    { numRuns: 3000 },
  );
});

interface Day {
  value: string;
  flag: string;
}

const day: fc.Arbitrary<Day> = fc.record({
  value: fc.oneof(
    { weight: 6, arbitrary: fc.nat(10_000_000).map((n) => String(n / 1000)) },
    { weight: 1, arbitrary: fc.constantFrom('', '-999.00', 'NA', 'Ice') },
    { weight: 1, arbitrary: fc.double({ min: 0, max: 1e9, noNaN: true }).map(String) },
  ),
  flag: fc.constantFrom('A', 'A:e', 'P', '', 'P:e', 'note "x", y'),
});

const record = fc.record({
  firstDay: fc.integer({ min: -40_000, max: 20_000 }),
  days: fc.array(day, { minLength: 14, maxLength: 60 }),
});

const missing = new Set(['', '-999.00', 'NA', 'Ice']);
const readingOf = (text: string): number => (missing.has(text) ? Number.NaN : Number(text));

function dateIn(style: string, dayNo: number): string {
  const [year, month, date] = isoDate(dayNo).split('-').map(Number);
  if (style === 'iso') return isoDate(dayNo);
  if (style === 'ymd') return `${year}/${month}/${date}`;
  return style === 'dmy' ? `${date}.${month}.${year}` : `${month}/${date}/${year}`;
}

test('what is written in a long table is read back, value for value and flag for flag', async () => {
  await fc.assert(
    fc.asyncProperty(
      ...([record, record] as const),
      fc.constantFrom('iso', 'ymd', 'dmy', 'mdy'),
      fc.constantFrom(',', ';', '\t'),
      fc.constantFrom('\n', '\r\n'),
      fc.boolean(),
      fc.boolean(),
      async (first, second, style, delimiter, lineEnd, interleaved, endsOpen) => {
        const quoted = (text: string) => (/[",;\t]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text);
        const lines = (code: string, { firstDay, days }: typeof first) =>
          days.map(({ value, flag }, at) => [code, dateIn(style, firstDay + at), value, quoted(flag)].join(delimiter));
        const [one, two] = [lines('0012', first), lines('Süd 2', second)];
        const rows = interleaved
          ? Array.from({ length: Math.max(one.length, two.length) }, (_, at) => [one[at], two[at]])
              .flat()
              .filter(Boolean)
          : [...one, ...two];
        const text = [['station', 'date', 'flow_m3s', 'flag'].join(delimiter), ...rows].join(lineEnd);
        const { report, parts } = await read(endsOpen ? text : text + lineEnd);
        expect(report).toMatchObject({ rows: rows.length, accepted: rows.length, rejected: [], layout: 'long' });
        for (const [at, written] of [first, second].entries()) {
          const { values, codes, codeList, firstDay } = parts[at];
          expect(firstDay).toBe(written.firstDay);
          expect([...values]).toEqual(written.days.map(({ value }) => readingOf(value)));
          const flags = written.days.map(({ flag, value }) => flag || (missing.has(value) ? value : ''));
          expect([...codes].map((code) => codeList[code].text)).toEqual(flags);
        }
      },
    ),
    { numRuns: 60 },
  );
});

test('what is written in a wide table is read back, station by station', async () => {
  await fc.assert(
    fc.asyncProperty(
      fc.integer({ min: -40_000, max: 20_000 }),
      fc.array(fc.array(day, { minLength: 5, maxLength: 5 }), { minLength: 2, maxLength: 30 }),
      async (firstDay, rows) => {
        const codes = rows[0].map((_, at) => `00${at}7`);
        const lines = rows.map((row, at) => [isoDate(firstDay + at), ...row.map(({ value }) => value)].join(','));
        const { report, parts } = await read(`date,${codes.join(',')}\n${lines.join('\n')}\n`, { unit: 'L/s' });
        expect(report).toMatchObject({ layout: 'wide', accepted: rows.length, rejected: [] });
        expect(parts.map(({ code }) => code)).toEqual(codes);
        for (const [at, { values }] of parts.entries())
          expect([...values]).toEqual(rows.map((row) => readingOf(row[at].value)));
      },
    ),
    { numRuns: 40 },
  );
});

test('what is written in blank-padded and fixed-width rows is read back', async () => {
  await fc.assert(
    fc.asyncProperty(record, async ({ firstDay, days }) => {
      const values = days.map(({ value }) => (missing.has(value) ? '-999.00' : Number(value).toFixed(3)));
      const parts = values.map((value, at) => [isoDate(firstDay + at).split('-'), value] as const);
      const blanks = parts.map(([date, value]) => `0101 ${date.join(' ')} ${value.padStart(16)} A`).join('\n');
      const fixed = parts
        .map(([date, value]) => `${date.join('')}${'1.5'.padStart(9)}${value.padStart(20)}`)
        .join('\r\n');
      const expected = values.map(readingOf);
      const first = await read(blanks, { unit: 'ft3/s' });
      expect(first.report).toMatchObject({ layout: 'whitespace', rejected: [] });
      expect([...first.parts[0].values]).toEqual(expected);
      const mapping = { layout: 'fixed-width', value: { slice: [17, 37] as [number, number] }, unit: 'mm/d' } as const;
      const second = await read(fixed, { mapping });
      expect(second.report.rejected).toEqual([]);
      expect([...second.parts[0].values]).toEqual(expected);
    }),
    { numRuns: 40 },
  );
});

/** Bytes, and text that looks like a table often enough to get past the first checks. */
const soup = fc.oneof(
  fc.uint8Array({ maxLength: 400 }),
  fc.string({ unit: 'binary', maxLength: 300 }).map((text) => Buffer.from(text)),
  fc
    .array(
      fc.constantFrom(
        ...[
          'date',
          'flow',
          'station',
          '\n',
          '\r\n',
          '\r',
          ',',
          ';',
          '\t',
          ' ',
          '"',
          '#',
          '2001-02-03',
          '2001',
          '2',
          '30',
        ],
        ...[
          '3/4/2001',
          '14/3/2001',
          '1.5',
          '-999',
          'Ice',
          '<0.5',
          '<',
          'A:e',
          'm3/s',
          '5s',
          '\0',
          'é',
          '\uFEFF',
          '{',
          '1e999',
          'lat',
        ],
        ...[
          'id',
          'date,flow_m3s\n',
          '2001-01-05,3\n',
          'station,date,flow_cfs,flag\n',
          'A,2001-01-01,5,e\n',
          '0101 1993 09 29 5.0 A\n',
        ],
      ),
      { maxLength: 80 },
    )
    .map((words) => Buffer.from(words.join(''))),
);

test('no bytes make the readers throw anything but IntakeError', async () => {
  await fc.assert(
    fc.asyncProperty(soup, fc.constantFrom(undefined, 'm3/s' as const), async (bytes, unit) => {
      const orRefused = async (reading: Promise<unknown>) => {
        const outcome = await reading.catch((error: unknown) => error);
        if (outcome instanceof Error) expect(outcome).toBeInstanceOf(IntakeError);
        return outcome;
      };
      await orRefused(read(bytes, { unit }));
      await withFile(bytes, async (path) => {
        await orRefused(readRegistry(path, 'file'));
        await orRefused(readLayer(path, 'file'));
        // Looking at a file never throws: its problems are what it answers.
        await inspectFile(path, { fileName: 'file', unit });
      });
    }),
    { numRuns: 500 },
  );
});

test('a row that is read is accepted or rejected, never lost', async () => {
  const line = fc.constantFrom(
    'A,2001-01-01,5,e',
    'A,2001-01-02,,',
    'B,2001-02-31,1,A',
    'C,x,1,A',
    'B,2001-01-03,abc,A',
    'A,2001',
    '"A","2001-01-05","7",""',
  );
  await fc.assert(
    fc.asyncProperty(fc.array(line, { maxLength: 40 }), async (lines) => {
      const { report, parts, rejected } = await read(
        ['station,date,flow_m3s,flag', 'Z,2001-01-01,1,A', ...lines].join('\n'),
      );
      expect(report.rows).toBe(lines.length + 1);
      expect(report.accepted + report.rejectedTotal).toBe(report.rows);
      expect(rejected).toHaveLength(report.rejectedTotal);
      const days = parts.reduce((sum, { codes }) => sum + codes.filter((code) => code !== 255).length, 0);
      const duplicates = report.stations.reduce((sum, station) => sum + station.duplicates, 0);
      expect(days + duplicates).toBe(report.accepted);
    }),
    // Rows that say the same are repeated, however many: they are no readings.
    { numRuns: 120, examples: [[Array.from({ length: 4 }, () => 'A,2001-01-01,5,e')]] },
  );
});

test('plain rows and the same rows in quotes give the same values, codes and rejections', async () => {
  const field = fc.record({
    station: fc.constantFrom('A', 'B2', '01013500', '010135009', ''),
    date: fc.oneof(
      fc.integer({ min: -9_000, max: 8_000 }).map(isoDate),
      fc.constantFrom(
        '2001-02-29',
        '2000-02-29',
        '2001-1-05',
        '1699-12-31',
        '2001-12-32',
        '2001-00-01',
        '20010105',
        '2001-01-0a',
      ),
    ),
    value: fc.oneof(
      decimal,
      fc.constantFrom('', '.', '5.', '.5', '-1', '-0', '-999', 'Ice', 'x', '<2', '1e3', '00', '1234567890123456'),
    ),
    flag: fc.constantFrom('', 'A', 'A:e', 'P', '<'),
  });
  await fc.assert(
    fc.asyncProperty(fc.array(field, { minLength: 1, maxLength: 40 }), async (rows) => {
      const table = (wrap: (text: string) => string) =>
        [
          'station,date,flow_m3s,flag',
          'Z,1990-01-01,1,A',
          ...rows.map(({ station, date, value, flag }) => [station, date, value, flag].map(wrap).join(',')),
        ].join('\n');
      const outcome = (text: string) =>
        read(text).then(
          ({ report, parts }) => ({
            ...report,
            sha256: '',
            days: parts.map(daysOf),
            rejected: report.rejected.map(({ row, reason }) => [row, reason]),
          }),
          (error: unknown) => (error as IntakeError).message,
        );
      expect(await outcome(table((text) => text))).toEqual(await outcome(table((text) => `"${text}"`)));
    }),
    { numRuns: 150 },
  );
});
