import { expect, test } from 'vitest';
import { validateXML } from 'xmllint-wasm';
import { type WrittenSeries, type WrittenStation, watermlDocument } from '../../../lib/export/waterml.ts';
import { FLAG } from '../../../lib/series/daily-series.ts';
import { QUANTITIES, type Quantity, UNITS_OF } from '../../../lib/series/quantities.ts';
import { SCHEMAS } from './waterml-schema.ts';

const NOW = new Date('2026-05-01T12:00:00Z');
const station: WrittenStation = {
  ...{ code: '0306', name: 'Mill & weir', river: 'Ribble', latitude: 53.8, longitude: -2.4, areaKm2: 12.5 },
};
const bare: WrittenStation = { code: 'X <1>', name: '', river: '', latitude: null, longitude: null, areaKm2: null };
const codeList = [
  { text: '', bits: 0 },
  { text: 'A:e & "x"', bits: FLAG.estimated },
  { text: 'Ice', bits: FLAG.ice, valueText: 'Ice' },
  { text: '<', bits: FLAG['below-detection'], valueText: '<' },
  { text: '', bits: FLAG.suspect | FLAG.provisional },
];
const seriesOf = (quantity: Quantity, unit: WrittenSeries['unit']): WrittenSeries => ({
  ...{ quantity, unit, firstDay: 11_016, codeList },
  values: Float64Array.from([1.5, 0.1 + 0.2, Number.NaN, 0.05, Number.NaN, 1e-7, 0]),
  codes: Uint8Array.from([0, 1, 2, 3, 255, 4, 0]),
});
const textOf = (...all: Parameters<typeof watermlDocument>) => [...watermlDocument(...all)].join('');

const everyUnit = QUANTITIES.flatMap((quantity) => UNITS_OF[quantity].map((unit) => seriesOf(quantity, unit)));
const usual: WrittenSeries = {
  ...{
    quantity: 'flow',
    unit: 'm3/s',
    firstDay: 0,
    codeList: [
      { text: 'P', bits: FLAG.provisional },
      { text: '', bits: 0 },
    ],
  },
  ...{ values: Float64Array.from([1, 2, 3]), codes: Uint8Array.from([0, 0, 1]) },
};

test.each([
  ['a document without stations', []],
  ['every quantity in every unit, with every kind of code', [{ station, series: everyUnit }]],
  ['a station of which only the code is known', [{ station: bare, series: [seriesOf('flow', 'L/s')] }]],
  [
    'several stations, one without a series',
    [
      { station: bare, series: [] },
      { station, series: [usual, usual] },
    ],
  ],
])('%s keeps the order and the types of the standard', async (_what, stations) => {
  const { errors } = await validateXML({
    xml: { fileName: 'written.xml', contents: textOf(stations, NOW) },
    schema: SCHEMAS[0],
    preload: SCHEMAS.slice(1),
  });
  expect(errors.map(({ message }) => message)).toEqual([]);
});

test('the schema above tells a wrong order', async () => {
  const text = textOf([{ station, series: [usual] }], NOW).replace(
    /(<wml2:time>[^/]*<\/wml2:time>)(<wml2:value>\d<\/wml2:value>)/,
    '$2$1',
  );
  const { valid } = await validateXML({ xml: text, schema: SCHEMAS[0], preload: SCHEMAS.slice(1) });
  expect(valid).toBe(false);
});

test('times are the dates of the days, values the shortest decimals, missing values nil with their reason', () => {
  const text = textOf([{ station, series: [seriesOf('flow', 'ft3/s')] }], NOW);
  // 11,016 days after 1970-01-01 is 2000-02-29.
  const points = text.match(/<wml2:time>.*?<wml2:value.*?>[^<]*/g);
  expect(points).toEqual([
    '<wml2:time>2000-02-29</wml2:time><wml2:value>1.5',
    '<wml2:time>2000-03-01</wml2:time><wml2:value>0.30000000000000004',
    '<wml2:time>2000-03-02</wml2:time><wml2:value xsi:nil="true"/>',
    '<wml2:time>2000-03-03</wml2:time><wml2:value>0.05',
    '<wml2:time>2000-03-05</wml2:time><wml2:value>1e-7',
    '<wml2:time>2000-03-06</wml2:time><wml2:value>0',
  ]);
  expect(text).toContain(
    '<wml2:nilReason xlink:href="http://www.opengis.net/def/nil/OGC/0/missing" xlink:title="missing"/>',
  );
  expect(text).toContain('<wml2:uom code="[cft_i]/s" xlink:title="ft3/s"/>');
  expect(text).toContain('interpolationType/AverageSucc');
  expect(text).toContain(
    '<gml:beginPosition>2000-02-29</gml:beginPosition><gml:endPosition>2000-03-06</gml:endPosition>',
  );
  expect(text).toContain('srsName="http://www.opengis.net/def/crs/EPSG/0/4326">53.8 -2.4<');
});

test('the flag of most days is said once, for the series', () => {
  const text = textOf([{ station, series: [usual] }], NOW);
  expect(text.match(/<swe:value>P<\/swe:value>/g)).toHaveLength(1);
  expect(text.match(/<swe:description>none<\/swe:description>/g)).toHaveLength(1);
});

test('characters that XML cannot hold are marked, and all others kept', () => {
  const odd = {
    ...usual,
    codeList: [
      { text: 'a\u0001b\ud800c', bits: 0 },
      { text: ']]>&\r', bits: 0 },
    ],
  };
  const text = textOf([{ station, series: [odd] }], NOW);
  expect(text).toContain('<swe:value>a\ufffdb\ufffdc</swe:value>');
  expect(text).toContain('<swe:value>]]&gt;&amp;&#13;</swe:value>');
});

test('a long record is written in pieces', () => {
  const days = 20_000;
  const long = { ...usual, values: new Float64Array(days), codes: new Uint8Array(days) };
  const pieces = [...watermlDocument([{ station, series: [long] }], NOW)];
  expect(pieces.length).toBeGreaterThan(20);
  expect(Math.max(...pieces.map(({ length }) => length))).toBeLessThan(80_000);
});
