import fc from 'fast-check';
import { expect, test } from 'vitest';
import { flowsCsv, flowsMapping } from '../../lib/export/flows-csv.ts';
import { flagBits } from '../../lib/intake/flags.ts';
import type { StagedPart } from '../../lib/intake/types.ts';
import { type DayCode, NO_ROW } from '../../lib/series/day-codes.ts';
import { read } from '../unit/intake/reading.ts';

/** Codes as readers make them: a flag's text, or the text in the value's place where there was no flag. */
const flag = fc.constantFrom('', 'A', 'A:e', 'P', 'B', 'note "x", y', 'Ice', 'ümlaut; 3');
const inValue = fc.constantFrom(undefined, 'NA', '-999.00', 'Ice', 'kaputt', '<');
const code = fc.tuple(flag, inValue, fc.boolean()).map(([text, valueText, special]): DayCode => {
  const written = valueText ?? '';
  const standard = flagBits(text) | flagBits(written);
  // In some files the letter B means ice.
  const bits = special && text === 'B' ? standard | 4 : standard;
  return { text: text || written, bits, ...(valueText === undefined ? {} : { valueText }) };
});

/** One meaning for a text in a file, as any file has. */
const codeList = fc
  .uniqueArray(code, { minLength: 1, maxLength: 12, selector: ({ text, valueText }) => `${text}|${valueText}` })
  .map((codes) => {
    const special = codes.some(({ text, bits }) => text === 'B' && (bits & 4) !== 0);
    return codes.map((one) => (special && one.text === 'B' ? { ...one, bits: one.bits | 4 } : one));
  });

const value = fc.oneof(
  fc.nat(10_000_000).map((n) => n / 1000),
  fc.double({ noNaN: true, min: -1e12, max: 1e12 }).map((n) => n + 0),
  fc.constantFrom(0, -99, -9999, 5e-324, 1e21, 1 / 3),
);

const part = fc
  .tuple(
    fc.constantFrom(...(['0012', 'Süd 2', 'a,b', '7"8'] as const)),
    codeList,
    fc.integer({ min: -90_000, max: 20_000 }),
    fc.array(fc.tuple(value, fc.nat(), fc.integer({ min: 0, max: 9 })), { minLength: 1, maxLength: 60 }),
  )
  .map(([station, codes, firstDay, days]): StagedPart => {
    const values = new Float64Array(days.length).fill(Number.NaN);
    const numbers = new Uint8Array(days.length).fill(NO_ROW);
    for (const [at, [number, pick, dice]] of days.entries()) {
      // A part begins and ends with a day that its file has a row for.
      if (dice === 0 && at > 0 && at < days.length - 1) continue;
      const chosen = pick % codes.length;
      const { valueText } = codes[chosen];
      numbers[at] = chosen;
      if (valueText === undefined ? dice > 1 : valueText === '<')
        values[at] = valueText === '<' ? Math.abs(number) : number;
    }
    return { code: station, unit: 'ft3/s', firstDay, values, codes: numbers, codeList: codes };
  });

const inUse = ({ firstDay, values, codes, codeList: list }: StagedPart) =>
  Array.from(codes, (number, at) => (number === NO_ROW ? null : [firstDay + at, values[at], list[number]]));

test('what was imported is exported and imported again, value for value and flag for flag', async () => {
  await fc.assert(
    fc.asyncProperty(
      fc.uniqueArray(part, { minLength: 1, maxLength: 3, selector: (one) => one.code }),
      async (parts) => {
        // One meaning for a text over the whole file.
        const special = parts.some(({ codeList: list }) => list.some(({ text, bits }) => text === 'B' && bits & 4));
        const written = parts.map((one) => ({
          ...one,
          codeList: one.codeList.map((c) => (special && c.text === 'B' ? { ...c, bits: c.bits | 4 } : c)),
        }));
        const again = await read([...flowsCsv(written)].join(''), { mapping: flowsMapping(written) });
        expect(again.report.rejectedTotal).toBe(0);
        expect(again.parts.map(inUse)).toEqual(written.map(inUse));
        expect(again.parts.map(({ code: station, unit }) => [station, unit])).toEqual(
          written.map(({ code: station, unit }) => [station, unit]),
        );
      },
    ),
    { numRuns: 400 },
  );
});

test('several quantities share a table, each read by its own unit', async () => {
  const days = { firstDay: 4000, codes: new Uint8Array([0, 0]), codeList: [{ text: '', bits: 0 }] };
  const flow = { code: 'A1', unit: 'L/s', values: new Float64Array([1.5, 2]), ...days } satisfies StagedPart;
  const stage = { ...flow, quantity: 'stage', unit: 'cm', values: new Float64Array([31, -2]) } satisfies StagedPart;
  const { parts } = await read([...flowsCsv([flow, stage])].join(''), { mapping: flowsMapping([flow, stage]) });
  expect(parts.map(({ quantity = 'flow', unit, values }) => [quantity, unit, ...values])).toEqual([
    ['flow', 'L/s', 1.5, 2],
    ['stage', 'cm', 31, -2],
  ]);
});

test('flowsMapping() refuses a quantity in two units', () => {
  const codes = { codeList: [] };
  expect(() =>
    flowsMapping([
      { unit: 'm3/s', ...codes },
      { unit: 'L/s', ...codes },
    ]),
  ).toThrow('flowsMapping: flow must come in one unit, got m3/s and L/s');
});
