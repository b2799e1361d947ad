import { expect, test } from 'vitest';
import { boundFindings, MOST_OF_A_KIND } from '../../../lib/checks/bound-findings.ts';
import { checkRecord } from '../../../lib/checks/check-record.ts';
import type { Finding } from '../../../lib/checks/finding.ts';
import { suspectStretches } from '../../../lib/checks/suspect-stretches.ts';
import { inventedRecord } from './invented-record.ts';

const TERMS = { areaKm2: 100, today: 30_000 };
const finding = (kind: Finding['kind'], firstDay: number, lastDay: number): Finding => ({
  ...{ kind, firstDay, lastDay, days: lastDay - firstDay + 1, detail: {} },
});

test('checkRecord gives the findings of all checks by day, and the days they make suspect', () => {
  const series = inventedRecord(11, { years: 30 });
  const { firstDay, values } = series;
  values[3000] = -1;
  values.fill(2, 2000, 2015);
  values[5000] = 4000;
  const before = values.slice();
  const { findings, suspect } = checkRecord(series, { areaKm2: 100, today: firstDay + values.length - 3 });
  expect(findings.map(({ kind, firstDay: day }) => [kind, day - firstDay])).toEqual([
    ['flat', 2000],
    ['negative', 3000],
    ['jump', 5000],
    ['too-large', 5000],
    ['future', values.length - 2],
  ]);
  const at = [2000, 2014, 3000, 3000, 5000, 5000, values.length - 2, values.length - 1];
  expect(suspect).toEqual(at.map((day) => firstDay + day));
  expect(values).toEqual(before);
});

test('checkRecord of an empty record, and of one without any value, is nothing', () => {
  const of = (values: Float64Array) => ({ firstDay: 0, values, flags: new Uint8Array(values.length) });
  const nothing = { findings: [], suspect: [] };
  expect(checkRecord(of(new Float64Array(0)), TERMS)).toEqual(nothing);
  expect(checkRecord(of(new Float64Array(9000).fill(Number.NaN)), TERMS)).toEqual(nothing);
  expect(() => checkRecord(of(new Float64Array(0)), { ...TERMS, today: 1.5 })).toThrow('today must be a whole day');
});

test('checkRecord lists at most 200 of a kind, and the last speaks for the rest; all days are suspect', () => {
  const values = Float64Array.from({ length: 900 }, (_, day) => (day % 3 === 0 ? -1 : 1 + day / 1000));
  const { findings, suspect } = checkRecord({ firstDay: 0, values, flags: new Uint8Array(900) }, TERMS);
  expect(findings).toHaveLength(MOST_OF_A_KIND);
  expect(findings[199]).toEqual({ kind: 'negative', firstDay: 597, lastDay: 897, days: 101, detail: { more: 101 } });
  expect(suspect).toHaveLength(600);
});

test('boundFindings leaves 200 as they are', () => {
  const all = Array.from({ length: MOST_OF_A_KIND }, (_, i) => finding('flat', 20 * i, 20 * i + 10));
  expect(boundFindings(all)).toEqual(all);
  expect(boundFindings([...all, finding('flat', 9000, 9010)])).toHaveLength(MOST_OF_A_KIND);
});

test('suspectStretches joins what touches or overlaps, and leaves steps out', () => {
  const found = [finding('flat', 3, 5), finding('jump', 5, 8), finding('jump', 4, 6), finding('step', 20, 20)];
  expect(suspectStretches([...found, finding('flat', 9, 9), finding('flat', 11, 12)])).toEqual([3, 9, 11, 12]);
  expect(suspectStretches([])).toEqual([]);
});
