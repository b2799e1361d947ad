import fc from 'fast-check';
import { expect, test } from 'vitest';
import { suggestLinks } from '../../../lib/region/link-suggestions.ts';
import { streamLengthKm } from '../../../lib/region/links-by-area.ts';
import type { StationFacts } from '../../../lib/region/ranking-types.ts';
import { type RiverLine, riverLines } from '../../../lib/region/river-lines.ts';
import { DEMO_SEED, generateRegion } from '../../../seed/generate.ts';

let next = 0;
const station = (code: string, [longitude, latitude]: [number, number], facts: Partial<StationFacts> = {}) => ({
  ...{ id: ++next, code, name: code, river: '', latitude, longitude, areaKm2: null, influence: 'natural' as const },
  ...facts,
});
const line = (name: string, ...points: [number, number][]): RiverLine => ({ name, points });
const pairs = (stations: StationFacts[], lines: RiverLine[], links: { upstream: string; downstream: string }[] = []) =>
  suggestLinks(stations, lines, links).map(({ upstream, downstream }) => `${upstream}>${downstream}`);
const turned = ({ name, points }: RiverLine): RiverLine => ({ name, points: [...points].reverse() });

/** A tributary, T, that joins the main stem, M, at (0, 0); both run east. */
const MAIN = line('Main', [-0.4, 0], [-0.2, 0], [0, 0], [0.2, 0], [0.4, 0]);
const TRIBUTARY = line('Side', [-0.2, 0.3], [-0.1, 0.1], [0, 0]);
const [UPPER, SIDE, LOWER] = [
  station('UPPER', [-0.3, 0], { areaKm2: 500, river: 'Main' }),
  station('SIDE', [-0.15, 0.2], { areaKm2: 120, river: 'Side' }),
  station('LOWER', [0.3, 0], { areaKm2: 700, river: 'Main' }),
];

test('suggestLinks leads both branches of a confluence to the station below it', () => {
  expect(pairs([UPPER, SIDE, LOWER], [MAIN, TRIBUTARY])).toEqual(['SIDE>LOWER', 'UPPER>LOWER']);
});

test('suggestLinks takes the nearest station down one line, and gives the way along the line', () => {
  const middle = station('MIDDLE', [0.1, 0.002], { areaKm2: 640, river: 'Main' });
  const found = suggestLinks([UPPER, LOWER, middle], [MAIN]);
  expect(found.map(({ upstream, downstream }) => `${upstream}>${downstream}`)).toEqual([
    'MIDDLE>LOWER',
    'UPPER>MIDDLE',
  ]);
  // 0.4° on the equator, 111.2 km a degree
  expect(found[1]).toMatchObject({ source: 'river-layer', reason: expect.stringContaining('44 km along the line') });
  expect(found[1].reason).toContain('from 500 to 640 km²');
});

test('suggestLinks finds the same links when every line is drawn upstream, or one of them', () => {
  const stations = [UPPER, SIDE, LOWER];
  const expected = ['SIDE>LOWER', 'UPPER>LOWER'];
  expect(pairs(stations, [turned(MAIN), turned(TRIBUTARY)])).toEqual(expected);
  expect(pairs(stations, [turned(MAIN), TRIBUTARY])).toEqual(expected);
  expect(pairs(stations, [MAIN, turned(TRIBUTARY)])).toEqual(expected);
});

test('suggestLinks joins a tributary that ends beside the line, between two of its points', () => {
  // 0.0005° is 56 m
  const loose = line('Side', [-0.2, 0.3], [0.1, 0.0005]);
  const side = station('SIDE', [-0.05, 0.15025], { areaKm2: 120 });
  expect(pairs([UPPER, side, LOWER], [MAIN, loose])).toEqual(['SIDE>LOWER', 'UPPER>LOWER']);
});

test('suggestLinks says nothing of an isolated station, nor across two rivers that do not meet', () => {
  const other = line('Other', [2, 1], [3, 1]);
  const alone = station('ALONE', [2.5, 1], { areaKm2: 9000 });
  expect(pairs([UPPER, alone], [MAIN, other])).toEqual([]);
  expect(pairs([UPPER], [MAIN])).toEqual([]);
  expect(pairs([], [])).toEqual([]);
});

test('suggestLinks keeps a station on an undrawn brook off the river beside it', () => {
  const brook = station('BROOK', [0.1, 0.006], { areaKm2: 8, river: 'Brook' });
  expect(pairs([UPPER, brook, LOWER], [MAIN])).toEqual(['UPPER>LOWER']);
  // Without names the areas alone tell: 500, 8, 700 km² on one line cannot be.
  const nameless = [UPPER, brook, LOWER].map((each) => ({ ...each, river: '' }));
  expect(pairs(nameless, [MAIN])).toEqual(['UPPER>LOWER']);
});

test('suggestLinks leaves a station on no line within the given reach to area and place', () => {
  const far = station('FAR', [0.3, 0.02], { areaKm2: 700, river: 'Main' });
  expect(suggestLinks([UPPER, far], [MAIN])).toMatchObject([{ source: 'area-and-position' }]);
  expect(suggestLinks([UPPER, far], [MAIN], [], { snapKm: 3 })).toMatchObject([{ source: 'river-layer' }]);
  expect(() => suggestLinks([UPPER, far], [MAIN], [], { snapKm: 0 })).toThrow(
    new RangeError('suggestLinks: snapKm must be above 0, got 0'),
  );
});

test('suggestLinks goes by river and area where there is no layer: the next larger one that is near enough', () => {
  // Hack 1957: 1.4 × 100^0.6 = 22.2 miles of stream in 100 square miles
  expect(streamLengthKm(100 * 1.609344 ** 2)).toBeCloseTo(22.19 * 1.609344, 1);
  const [a, b, c] = [
    station('A', [0, 0], { areaKm2: 100, river: 'Main ' }),
    station('B', [0.2, 0], { areaKm2: 250, river: 'main' }),
    station('C', [0.4, 0], { areaKm2: 900, river: 'Main' }),
  ];
  expect(suggestLinks([c, b, a], [])).toEqual([
    {
      ...{ upstream: 'A', downstream: 'B', source: 'area-and-position' },
      reason: 'Next larger drainage area on main, 2.5 times as large, 22 km away as the crow flies.',
    },
    expect.objectContaining({ upstream: 'B', downstream: 'C' }),
  ]);
  const faraway = station('D', [9, 0], { areaKm2: 300, river: 'Main' });
  expect(pairs([a, faraway], [])).toEqual([]);
  const otherRiver = station('E', [0.1, 0], { areaKm2: 300, river: 'Another' });
  expect(pairs([a, otherRiver], [])).toEqual([]);
  const twin = station('F', [0.1, 0], { areaKm2: 101, river: 'Main' });
  expect(pairs([a, twin], [])).toEqual([]);
});

test('suggestLinks passes over stations that have a link already', () => {
  const links = [{ upstream: 'UPPER', downstream: 'LOWER' }];
  expect(pairs([UPPER, SIDE, LOWER], [MAIN, TRIBUTARY], links)).toEqual(['SIDE>LOWER']);
});

test('riverLines reads lines of every GeoJSON kind with their names, and passes over what is no line', () => {
  const geojson = {
    type: 'FeatureCollection',
    features: [
      {
        ...{ type: 'Feature', properties: { NAME: 'Elva', other: 1 } },
        geometry: { type: 'MultiLineString', coordinates: [MAIN.points, [[0, 0]]] },
      },
      {
        type: 'Feature',
        properties: null,
        geometry: {
          type: 'LineString',
          coordinates: [
            [0, 0],
            [1, 'x'],
            [1, 1],
          ],
        },
      },
      { type: 'Feature', properties: {}, geometry: { type: 'Point', coordinates: [0, 0] } },
      { type: 'Feature', properties: {}, geometry: null },
    ],
  };
  expect(riverLines(geojson)).toEqual([
    { name: 'Elva', points: MAIN.points },
    {
      name: '',
      points: [
        [0, 0],
        [1, 1],
      ],
    },
  ]);
  expect(riverLines(null)).toEqual([]);
});

test.each([
  ['as drawn', (lines: RiverLine[]) => lines, 34, 0],
  ['drawn upstream', (lines: RiverLine[]) => lines.map(turned), 34, 0],
  ['without a layer', () => [], 13, 0],
] as const)(
  'suggestLinks on the demo basin, rivers %s: how many of the true links, how many false',
  (_, draw, right, wrong) => {
    const region = generateRegion({ seed: DEMO_SEED });
    const rivers = riverLines(region.layers().find(({ kind }) => kind === 'river')?.geojson);
    const truth = new Set(region.network.map(({ upstream, downstream }) => `${upstream}>${downstream}`));
    expect(truth.size).toBe(34);
    const found = pairs(
      region.stations.map((facts, id) => ({ ...facts, id })),
      draw(rivers),
    );
    expect(found.filter((pair) => truth.has(pair))).toHaveLength(right);
    expect(found.filter((pair) => !truth.has(pair))).toHaveLength(wrong);
  },
);

test('suggestLinks on a tree of rivers: every suggestion is the next station down, drawn either way', () => {
  fc.assert(
    fc.property(fc.array(fc.nat({ max: 1000 }), { minLength: 2, maxLength: 25 }), fc.boolean(), (choices, upwards) => {
      // Node i flows into an earlier one; places on a spiral are all apart.
      const into = choices.map((choice, i) => (i === 0 ? -1 : choice % i));
      const place = (i: number): [number, number] => [0.1 * i * Math.cos(i), 0.1 * i * Math.sin(i)];
      const area = choices.map(() => 10);
      for (let i = choices.length - 1; i > 0; i -= 1) area[into[i]] += area[i];
      const stations = choices.map((_, i) => station(`S${String(i).padStart(2, '0')}`, place(i), { areaKm2: area[i] }));
      const lines = choices.slice(1).map((_, i) => line('', place(i + 1), place(into[i + 1])));
      const found = pairs(stations, upwards ? lines.map(turned) : lines);
      const truth = into.slice(1).map((j, i) => `${stations[i + 1].code}>${stations[j].code}`);
      expect(found).toEqual(truth.sort());
    }),
    { numRuns: 100 },
  );
});
