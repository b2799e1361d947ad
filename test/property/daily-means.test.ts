import fc from 'fast-check';
import { expect, test } from 'vitest';
import { isoDate } from '../../lib/calendar/day.ts';
import { flagBits } from '../../lib/intake/flags.ts';
import { read } from '../unit/intake/reading.ts';

const STEPS = [10, 15, 30, 60, 180];

test('the mean of a day is that of its values where they cover enough of it, in whatever order stations come', async () => {
  const reading = fc.record({
    value: fc.option(
      fc.nat(100_000).map((n) => n / 8),
      { freq: 6 },
    ),
    flag: fc.constantFrom('', 'e', 'P', 'A'),
    skipped: fc.integer({ min: 0, max: 9 }).map((dice) => dice === 0),
  });
  await fc.assert(
    fc.asyncProperty(
      ...([fc.constantFrom(...STEPS), fc.double({ min: 0, max: 1, noNaN: true }), fc.boolean()] as const),
      fc.infiniteStream(reading),
      async (step, share, byTurns, stream) => {
        // So many days that every step is the usual one of its month.
        const stations = ['A', 'B'].map((code) => ({
          code,
          days: Array.from({ length: 6 }, () => [] as (number | null)[]),
          bits: [0, 0, 0, 0, 0, 0],
        }));
        const rows: { at: number; text: string }[] = [];
        for (const [number, { code, days, bits }] of stations.entries()) {
          for (const [day, values] of days.entries()) {
            for (let minute = 0; minute < 1440; minute += step) {
              const { value, flag, skipped } = stream.next().value;
              if (skipped && day !== 2) continue;
              values.push(value);
              if (value !== null) bits[day] |= flagBits(flag);
              const clock = [Math.floor(minute / 60), minute % 60]
                .map((part) => String(part).padStart(2, '0'))
                .join(':');
              const time = byTurns ? day * 1440 + minute + number / 2 : number * 10_000 + day * 1440 + minute;
              rows.push({ at: time, text: `${code},${isoDate(11_000 + day)}T${clock},${value ?? ''},${flag}` });
            }
          }
        }
        rows.sort((a, b) => a.at - b.at);
        const text = `station,time,flow_m3s,flag\n${rows.map((row) => row.text).join('\n')}\n`;
        const { parts } = await read(text, { mapping: { dailyMean: share } });
        for (const { code, days, bits } of stations) {
          const part = parts.find((one) => one.code === code);
          for (const [day, values] of days.entries()) {
            const present = values.filter((value) => value !== null);
            const covered = (present.length * step) / 1440;
            if (values.length === 0) continue;
            const at = 11_000 + day - (part?.firstDay ?? 0);
            const got = part?.values[at] ?? Number.NaN;
            const exact = present.reduce((sum, value) => sum + value, 0) / present.length;
            if (Math.abs(covered - share) < 1e-6) continue;
            if (present.length === 0 || covered < share) expect(got).toBeNaN();
            else {
              expect(Math.abs(got - exact)).toBeLessThanOrEqual(1e-9 * exact);
              expect(part?.codeList[part.codes[at]].bits).toBe(bits[day]);
            }
          }
        }
      },
    ),
    { numRuns: 40 },
  );
});
