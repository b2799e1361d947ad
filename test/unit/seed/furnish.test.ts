import { expect, test } from 'vitest';
import { checkRecord } from '../../../lib/checks/check-record.ts';
import { annualMinima } from '../../../lib/lowflow/annual-minima.ts';
import { usedYears } from '../../../lib/region/used-years.ts';
import { weatherTrend } from '../../../lib/region/weather-trend.ts';
import { toShownUnit } from '../../../lib/series/quantities.ts';
import { DEMO_SEED, generateRegion, type SeedRecord } from '../../../seed/generate.ts';

const plain = generateRegion({ seed: DEMO_SEED });
const region = generateRegion({ seed: DEMO_SEED, furnished: true });
const records = new Map([...region.records()].map((record) => [record.code, record]));
const beside = [...records.values()].flatMap((record) => record.beside);
const [faulty] = region.stations.filter(({ notes }) => notes.includes('logger'));

test('a furnished region has the flows of the plain one, value for value, but where faults are planted', () => {
  for (const { code, values } of plain.records()) {
    const same = Buffer.compare(bytesOf(values), bytesOf(records.get(code)!.values)) === 0;
    expect([code, same]).toEqual([code, code !== faulty.code]);
  }
  expect(plain.furnishings.extras).toEqual([]);
});

const foundIn = ({ firstDay, values }: Pick<SeedRecord, 'firstDay' | 'values'>, areaKm2: number | null = null) => {
  const series = { firstDay, values, flags: new Uint8Array(values.length) };
  return checkRecord(series, { areaKm2, today: firstDay + values.length }).findings;
};

test('the planted faults are found by the checks, and nothing of the kind at a sound station', () => {
  const kindsAt = (record: SeedRecord) => foundIn(record).map(({ kind }) => kind);
  const found = foundIn(records.get(faulty.code)!, faulty.areaKm2);
  const kinds = ['negative', 'flat', 'jump', 'repeated', 'too-large'];
  expect(found.map(({ kind }) => kind)).toEqual(expect.arrayContaining(kinds));
  const [slipped] = region.stations.filter(({ notes }) => notes.includes('another archive'));
  expect(kindsAt(records.get(slipped.code)!)).toContain('unit-change');
  const sound = kindsAt(records.get(region.stations[0].code)!);
  expect(sound.filter((kind) => ['negative', 'jump', 'unit-change'].includes(kind))).toEqual([]);
});

test('a person has rejected the day that is too large, and noted the month that stands twice', () => {
  const found = foundIn(records.get(faulty.code)!, faulty.areaKm2);
  const { marks } = records.get(faulty.code)!;
  const over = (of: string) => found.find(({ kind }) => kind === of)!;
  expect(marks.map(({ kind }) => kind)).toEqual(['reject', 'note']);
  for (const [i, kind] of ['too-large', 'repeated'].entries()) {
    expect(marks[i].firstDay).toBeLessThanOrEqual(over(kind).firstDay);
    expect(marks[i].lastDay).toBeGreaterThanOrEqual(over(kind).lastDay);
  }
  expect([...records.values()].filter((record) => record.marks.length > 0)).toHaveLength(1);
});

test('what the water works meters neither repeats itself nor runs flat', () => {
  const [pump] = region.furnishings.extras;
  const found = foundIn(beside.find(({ code }) => code === pump.code)!);
  expect(found.filter(({ kind }) => kind !== 'step')).toEqual([]);
});

test('stage at three stations rises and falls with the flow, weather is kept at several', () => {
  const stage = beside.filter(({ quantity }) => quantity === 'stage');
  expect(stage).toHaveLength(3);
  for (const { code, unit, firstDay, values } of stage) {
    const flow = records.get(code)!;
    const at = firstDay - flow.firstDay;
    const low = values.findIndex((value, i) => i > 1000 && value < 40 && flow.values[at + i] > 0);
    const metres = values[Math.max(0, low)] * toShownUnit('stage', unit, null);
    expect(metres).toBeGreaterThan(0);
    expect(metres).toBeLessThan(20);
    // Without a new weir between them, more water stands higher.
    for (let i = 1; i < 365; i += 1) {
      const difference = flow.values[at + i] - flow.values[at + i - 1];
      if (difference > 0) expect(values[i]).toBeGreaterThanOrEqual(values[i - 1]);
    }
  }
  const codesOf = (quantity: string) => beside.filter((each) => each.quantity === quantity).map(({ code }) => code);
  expect(codesOf('rainfall')).toHaveLength(3);
  expect(codesOf('potential-evaporation')).toEqual(codesOf('rainfall'));
  for (const { quantity, values } of beside.filter((each) => each.quantity !== 'flow' && each.quantity !== 'stage')) {
    const yearly = (365.25 * values.reduce((sum, value) => sum + (value || 0), 0)) / values.length;
    expect([quantity, yearly > 400 && yearly < 2500]).toEqual([quantity, true]);
    expect(values.every((value) => Number.isNaN(value) || value >= 0)).toBe(true);
  }
});

test('the lows of a natural headwater follow the rain gauged there', () => {
  const gauged = beside.filter(({ quantity }) => quantity === 'rainfall').map(({ code }) => code);
  const natural = region.stations.filter(({ code, influence }) => gauged.includes(code) && influence === 'natural');
  expect(natural).toHaveLength(1);
  const [{ code, name }] = natural;
  const flow = records.get(code)!;
  const options = { yearStart: 2, season: null, days: 7, maxMissingDays: 18, exclude: [] };
  const minima = usedYears(annualMinima({ ...flow, flags: new Uint8Array(flow.values.length) }, options), null);
  const weather = beside.find((each) => each.code === code && each.quantity === 'rainfall')!;
  const site = { code, name };
  const terms = { days: 7, period: null, serialCorrection: 'ar1', alpha: 0.1 } as const;
  const input = { station: site, minima, quantity: 'rainfall', from: site, weather, antecedentDays: 270 } as const;
  const { correlation, years } = weatherTrend(input, terms, '');
  expect(years.length).toBeGreaterThan(40);
  expect(correlation).toBeGreaterThan(0.7);
});

test('what the water works pumps, added to the flow at its gauge, is no less than the flow', () => {
  const [pump, derived] = region.furnishings.extras;
  expect(derived.derived?.terms.map(({ code }) => code)).toEqual([derived.code.slice(0, -1), pump.code]);
  const pumped = beside.find(({ code }) => code === pump.code)!;
  expect(pumped.unit).toBe('L/s');
  expect(pumped.values.every((value) => value >= 0)).toBe(true);
  expect(Math.max(...pumped.values)).toBeGreaterThan(100);
});

test('links stand for a part of the network, and every one of them is true', () => {
  const truth = region.network.map(({ upstream, downstream }) => `${upstream}>${downstream}`);
  const links = region.furnishings.links.map(({ upstream, downstream }) => `${upstream}>${downstream}`);
  expect(links.length).toBeGreaterThan(5);
  expect(links.length).toBeLessThan(truth.length / 2);
  for (const link of links) expect(truth).toContain(link);
});

const bytesOf = (values: Float64Array) => Buffer.from(values.buffer, values.byteOffset, values.byteLength);
