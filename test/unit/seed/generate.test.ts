import { createHash } from 'node:crypto';
import { expect, test } from 'vitest';
import { DEFAULT_BASIS } from '../../../lib/basis.ts';
import { isoDate, parseIsoDate } from '../../../lib/calendar/day.ts';
import { annualMinima } from '../../../lib/lowflow/annual-minima.ts';
import { NO_ROW } from '../../../lib/series/day-codes.ts';
import { median } from '../../../lib/statistics/quantile.ts';
import { DEMO_SEED, generateRegion, type SeedRecord, type SeedStation } from '../../../seed/generate.ts';

const region = generateRegion({ seed: DEMO_SEED });
const records = new Map([...region.records()].map((record) => [record.code, record]));
const recordOf = ({ code }: SeedStation) => records.get(code)!;
const withNote = (words: string) => region.stations.filter(({ notes }) => notes.includes(words));
const withInfluence = (influence: string) => region.stations.filter((station) => station.influence === influence);

const flagsOf = ({ codes, codeList }: SeedRecord) =>
  Uint8Array.from(codes, (code) => (code === NO_ROW ? 0 : codeList[code].bits));
const minimaOf = (station: SeedStation) => {
  const record = recordOf(station);
  const series = { firstDay: record.firstDay, values: record.values, flags: flagsOf(record) };
  return annualMinima(series, { ...DEFAULT_BASIS, yearStart: 2 });
};
/** Usable minima of the low-flow years first..last. */
const usableMinima = (station: SeedStation, first: number, last: number) => {
  const { years, usable, minimum } = minimaOf(station);
  return minimum.filter((_, i) => usable[i] === 1 && years[i] >= first && years[i] <= last);
};
const shareOfZeros = (station: SeedStation) => {
  const minima = usableMinima(station, 0, 9999);
  return minima.filter((minimum) => minimum === 0).length / minima.length;
};
/** Everything that a record says, in one word: comparing the arrays element by element takes long. */
const digest = ({ code, firstDay, values, codes, codeList }: SeedRecord) =>
  createHash('sha256')
    .update(JSON.stringify([code, firstDay, codeList]))
    .update(new Uint8Array(values.buffer, values.byteOffset, values.byteLength))
    .update(codes)
    .digest('hex');
const yearsOf = ({ values }: SeedRecord) => values.length / 365.25;

test('generateRegion makes 36 stations with one record each, and says that they are nowhere', () => {
  expect(region.stations).toHaveLength(36);
  expect([...records.keys()].sort()).toEqual(region.stations.map(({ code }) => code));
  expect(new Set(region.stations.map(({ name }) => name)).size).toBe(36);
  for (const { latitude, longitude } of region.stations) {
    // open ocean between the Azores and Bermuda
    expect(latitude! > 36 && latitude! < 39).toBe(true);
    expect(longitude! > -43 && longitude! < -39).toBe(true);
  }
});

test('generateRegion gives the same region for the same seed, value for value, and another for another', () => {
  const made = (seed: number) => {
    const { stations, layers, records: walk } = generateRegion({ seed, stations: 6, years: 15 });
    return [JSON.stringify(stations), JSON.stringify(layers()), ...Array.from(walk(), digest)];
  };
  expect(made(11)).toEqual(made(11));
  const [one, other] = [made(11), made(12)];
  for (const [i, part] of one.entries()) expect(part).not.toBe(other[i]);
});

test('a region’s records can be walked twice, and one after another', () => {
  const [first] = region.records();
  expect(digest(first)).toBe(digest(records.get(first.code)!));
});

test('records are 25 to 90 years long but for one too short to be ranked', () => {
  const short = withNote('young');
  expect(short).toHaveLength(1);
  expect(yearsOf(recordOf(short[0]))).toBeLessThan(20);
  for (const station of region.stations) {
    const years = yearsOf(recordOf(station));
    expect(years).toBeLessThan(91);
    if (station !== short[0]) expect(years).toBeGreaterThan(24);
  }
});

test('values are never negative, and written no finer than a litre a second', () => {
  for (const { values } of records.values()) {
    for (const value of values) {
      if (Number.isNaN(value)) continue;
      if (!(value >= 0 && Math.abs(value * 1000 - Math.round(value * 1000)) < 1e-6)) throw new Error(`value ${value}`);
    }
  }
});

test('a dam raises the low flows after it was filled', () => {
  const [station] = region.stations.filter(({ changes }) =>
    changes.some(({ note }) => note.includes('above the station')),
  );
  expect(station.influence).toBe('regulated');
  const { date, kind } = station.changes.find(({ note }) => note.includes('above the station'))!;
  expect(kind).toBe('dam');
  const year = Number(date.slice(0, 4));
  const [before, after] = [usableMinima(station, 0, year - 1), usableMinima(station, year + 1, 9999)];
  expect(Math.min(before.length, after.length)).toBeGreaterThan(10);
  expect(median(after) / median(before)).toBeGreaterThan(1.5);
});

test('abstracted stations lose low flow, urban ones gain it', () => {
  const change = (station: SeedStation) => {
    const [early, late] = [usableMinima(station, 1973, 1992), usableMinima(station, 2005, 2024)];
    return median(late) / median(early);
  };
  expect(withInfluence('abstracted').length).toBeGreaterThanOrEqual(2);
  for (const station of withInfluence('abstracted')) expect(change(station)).toBeLessThan(0.85);
  expect(withInfluence('urban').length).toBeGreaterThanOrEqual(2);
  for (const station of withInfluence('urban')) expect(change(station)).toBeGreaterThan(1.2);
});

test('no station below a dam, an intake or an outfall of some size calls itself natural', () => {
  const byCode = new Map(region.stations.map((station) => [station.code, station]));
  const below = new Map(region.network.map(({ upstream, downstream }) => [upstream, downstream]));
  const deeds = ['dam', 'abstraction', 'discharge'];
  let looked = 0;
  for (const { code, areaKm2, changes } of region.stations) {
    const own = changes.find(({ kind, note }) => deeds.includes(kind) && !note.includes('upstream'));
    if (!own || areaKm2 === null) continue;
    for (let at = below.get(code); at !== undefined; at = below.get(at)) {
      const station = byCode.get(at)!;
      if (areaKm2 / station.areaKm2! < 0.01) continue;
      looked += 1;
      expect(station.influence, at).not.toMatch(/natural|unknown/);
      expect(station.changes, at).toContainEqual(expect.objectContaining({ date: own.date, kind: own.kind }));
      expect(station.changes.some(({ note }) => note.includes(`${code}, upstream`))).toBe(true);
    }
  }
  expect(looked).toBeGreaterThanOrEqual(5);
});

test('dated changes lie inside their records in order; named flows have a value of their own unit', () => {
  const kinds = new Set(region.stations.flatMap(({ changes }) => changes.map(({ kind }) => kind)));
  expect([...kinds]).toEqual(
    expect.arrayContaining(['dam', 'abstraction', 'discharge', 'weir changed', 'rating changed']),
  );
  for (const { changes } of region.stations) {
    const dates = changes.map(({ date }) => date);
    expect(dates).toEqual([...dates].sort());
    for (const date of dates) expect(Number.isNaN(parseIsoDate(date))).toBe(false);
  }
  const flows = region.stations.flatMap(({ namedFlows }) => namedFlows);
  expect(new Set(flows.map(({ kind }) => kind)).size).toBe(4);
  for (const { value, unit } of flows) expect(value, unit).toBeGreaterThan(unit === 'L/s' ? 10 : 0.1);
});

test('spring-fed stations have no area and no catchment drawn', () => {
  const springs = withInfluence('spring-fed');
  expect(springs).toHaveLength(2);
  const drawn = region.layers().find(({ kind }) => kind === 'catchment')!.geojson.features;
  for (const { areaKm2, code } of springs) {
    expect(areaKm2).toBeNull();
    expect(drawn.some(({ properties }) => properties?.code === code)).toBe(false);
  }
  expect(drawn).toHaveLength(34);
});

test('some rivers run dry in a third of the years or more, some in a tenth to a third', () => {
  const often = withNote('most summers');
  const sometimes = withNote('some summers');
  expect([often.length, sometimes.length]).toEqual([2, 2]);
  for (const station of often) expect(shareOfZeros(station)).toBeGreaterThanOrEqual(1 / 3);
  for (const station of sometimes) {
    expect(shareOfZeros(station)).toBeGreaterThanOrEqual(0.1);
    expect(shareOfZeros(station)).toBeLessThan(1 / 3);
  }
});

test('one station has no rows for ten years', () => {
  const [station] = withNote('Closed from 1994');
  const { firstDay, codes, values } = recordOf(station);
  const empty = Array.from(codes.keys()).filter((i) => codes[i] === NO_ROW);
  expect(empty).toHaveLength(3652);
  expect(isoDate(firstDay + empty[0])).toBe('1994-01-01');
  expect(isoDate(firstDay + empty[empty.length - 1])).toBe('2003-12-31');
  expect(empty.every((i) => Number.isNaN(values[i]))).toBe(true);
});

test('one station has ten years about 35 times too large', () => {
  const [station] = withNote('another archive');
  const slipped = median(usableMinima(station, 1978, 1986));
  const others = median([...usableMinima(station, 0, 1976), ...usableMinima(station, 1988, 9999)]);
  expect(slipped / others).toBeGreaterThan(20);
  expect(slipped / others).toBeLessThan(60);
});

test('the last months are provisional at every station that is open, and only they', () => {
  const closed = withNote('Closed in September 2016');
  expect(closed).toHaveLength(1);
  for (const station of region.stations) {
    const record = recordOf(station);
    const flags = flagsOf(record);
    const provisional = Array.from(flags.keys()).filter((i) => (flags[i] & 2) !== 0);
    if (station === closed[0]) {
      expect(provisional).toEqual([]);
      continue;
    }
    expect(isoDate(record.firstDay + provisional[0]) >= '2024-10-01').toBe(true);
    expect(provisional.length).toBeGreaterThan(30);
  }
});

test('small gaps and estimated days occur everywhere; ice in winters at some stations and not at all', () => {
  const iced = region.stations.filter((station) => {
    const record = recordOf(station);
    const flags = flagsOf(record);
    expect(record.values.some((value, i) => Number.isNaN(value) && record.codes[i] !== NO_ROW)).toBe(true);
    expect(flags.some((bits) => (bits & 1) !== 0)).toBe(true);
    const days = Array.from(flags.keys()).filter((i) => (flags[i] & 4) !== 0);
    for (const i of days) {
      const month = isoDate(record.firstDay + i).slice(5, 7);
      if (!['11', '12', '01', '02', '03', '04'].includes(month)) throw new Error(`ice in month ${month}`);
    }
    return days.length > 100;
  });
  expect(iced.length).toBeGreaterThanOrEqual(3);
  expect(iced.length).toBeLessThanOrEqual(33);
});

test('generateRegion with years gives every record that length', () => {
  const small = generateRegion({ seed: 3, stations: 5, years: 12 });
  expect(small.stations).toHaveLength(5);
  for (const { firstDay, values } of small.records()) {
    expect(isoDate(firstDay)).toBe('2013-01-01');
    expect(isoDate(firstDay + values.length - 1)).toBe('2024-12-31');
  }
});

test('generateRegion refuses numbers that cannot be', () => {
  expect(() => generateRegion({ seed: 1, stations: 0 })).toThrow(
    'generateRegion: stations must be a whole number in 1..20000, got 0',
  );
  expect(() => generateRegion({ seed: 1.5 })).toThrow(RangeError);
  expect(() => generateRegion({ seed: 1, years: 0 })).toThrow(RangeError);
});
