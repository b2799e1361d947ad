import { expect, test } from 'vitest';
import { flagBitsPresent, usableFlow } from '../../../lib/series/usable-flow.ts';
import { seriesOf, withFlag } from '../series-of.ts';

const record = seriesOf([2000, 1, 1], [1, 2, 3, 4, 5, 6, 7, 8, 9, 10]);

test('usableFlow hands back the record’s own array when nothing is left out', () => {
  expect(usableFlow(record, ['provisional'])).toBe(record.values);
  expect(usableFlow(withFlag(record, 'ice', 2, 3), ['provisional'])).toBe(record.values);
});

test('usableFlow leaves out excluded flags and nothing else, without touching the record', () => {
  const flagged = withFlag(withFlag(record, 'ice', 0, 0), 'provisional', 9, 9);
  const before = flagged.values.slice();
  expect([...usableFlow(flagged, ['provisional'])]).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, Number.NaN]);
  expect([...usableFlow(flagged, ['provisional', 'ice'])]).toEqual([Number.NaN, 2, 3, 4, 5, 6, 7, 8, 9, Number.NaN]);
  expect(flagged.values).toEqual(before);
});

test('usableFlow leaves out rejected days whatever the basis says, also beside other flags', () => {
  const rejected = withFlag(withFlag(record, 'ice', 4, 4), 'rejected', 4, 4);
  expect(usableFlow(rejected, [])[4]).toBeNaN();
});

test('flagBitsPresent sees every position, on arrays that begin off a word as well', () => {
  for (let at = 0; at < 9; at += 1) {
    const flags = new Uint8Array(12).subarray(1, 10);
    flags[at] = 16;
    expect(flagBitsPresent(flags)).toBe(16);
    expect(flagBitsPresent(flags.slice())).toBe(16);
  }
  expect(flagBitsPresent(Uint8Array.of(1, 0, 2, 4, 32))).toBe(39);
  expect(flagBitsPresent(new Uint8Array(0))).toBe(0);
});

test('usableFlow refuses values and flags of unlike length', () => {
  expect(() => usableFlow({ ...record, flags: new Uint8Array(3) }, [])).toThrow('got 10 and 3');
});
