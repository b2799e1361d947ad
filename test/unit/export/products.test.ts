import { parse } from 'csv-parse/sync';
import { expect, test } from 'vitest';
import { basisSentence } from '../../../lib/basis.ts';
import { curvesProduct } from '../../../lib/export/curves-product.ts';
import { minimaProduct } from '../../../lib/export/minima-product.ts';
import { PROGRAM_VERSION } from '../../../lib/export/program-version.ts';
import type { Provenance } from '../../../lib/export/provenance.ts';
import { RANKING_COLUMNS } from '../../../lib/export/ranking-csv.ts';
import { rankingMetadata } from '../../../lib/export/ranking-metadata.ts';
import { rankingProduct } from '../../../lib/export/ranking-product.ts';
import { stationsProduct } from '../../../lib/export/stations-product.ts';
import { metadataName } from '../../../lib/export/table-metadata.ts';
import type { Ranking } from '../../../lib/region/ranking-types.ts';
import { sampleMinima } from '../jobs/sample-minima.ts';
import { RANKED, RESOLVED, UNRANKED } from './sample-row.ts';

const from: Provenance = {
  region: { slug: 'upper-wethe', name: 'Upper Wethe', invented: true },
  basis: RESOLVED,
  dataHash: 'ab12',
  warnings: ['periods differ'],
};

const ranking: Ranking = {
  basis: RESOLVED,
  rows: [RANKED, UNRANKED],
  counts: { stations: 2, ranked: 1, drying: 0, unranked: 1, falling: 1, rising: 0 },
  warnings: [],
};

test('the metadata of a ranking describe its columns and say what it rests on', () => {
  const metadata = rankingMetadata(from, 'wethe.csv');
  expect(metadata['@context']).toEqual(['http://www.w3.org/ns/csvw', { '@language': 'en' }]);
  expect(metadata.url).toBe('wethe.csv');
  const { columns } = metadata.tableSchema as { columns: Record<string, string>[] };
  expect(columns.map(({ name }) => name)).toEqual(RANKING_COLUMNS.map(({ name }) => name));
  expect(columns.find(({ name }) => name === 'mean_minimum_m3s')).toMatchObject({
    datatype: 'number',
    'schema:unitText': 'm³/s',
  });
  expect((metadata.notes as object[])[0]).toMatchObject({
    region: 'Upper Wethe',
    invented: true,
    basis: RESOLVED,
    basisSentence: basisSentence(RESOLVED),
    dataHash: 'ab12',
    programVersion: PROGRAM_VERSION,
    warnings: ['periods differ'],
  });
});

test('metadataName is the name by which programs find metadata beside a CSV file', () => {
  expect(metadataName('ranking.csv')).toBe('ranking.csv-metadata.json');
});

test('the ranking as JSON has the names of the CSV columns, null for what is missing, and the basis', () => {
  const product = JSON.parse(rankingProduct('json', ranking, from));
  expect(product).toMatchObject({ basisSentence: basisSentence(RESOLVED), dataHash: 'ab12', counts: ranking.counts });
  expect(product.stations[0]).toMatchObject({
    rank: 1,
    station_code: '007',
    slope_ci_high: 0.1 + 0.2,
    minima_m3s: [0.4, 0.3],
  });
  expect(product.stations[1]).toMatchObject({
    rank: null,
    latitude: null,
    unranked_reason: '3 usable years, 20 needed',
  });
});

test('the ranking as GeoJSON has a point of longitude and latitude, and null for a station without a place', () => {
  const product = JSON.parse(rankingProduct('geojson', ranking, from));
  expect(product.type).toBe('FeatureCollection');
  expect(product.features[0].geometry).toEqual({ type: 'Point', coordinates: [-7.5, 50.25] });
  expect(product.features[1].geometry).toBeNull();
  expect(product.features[1].properties.station_code).toBe('B 2');
});

test('a narrowed ranking leaves stations out and changes no figure of the others', () => {
  const whole = parse(rankingProduct('csv', ranking, from), { columns: true }) as object[];
  const narrow = parse(rankingProduct('csv', ranking, from, { codes: ['007'] }), { columns: true }) as object[];
  expect(narrow).toEqual(whole.slice(0, 1));
});

const stations = [
  { station: RANKED, minima: sampleMinima(1990, [0.5, Number.NaN], ['', '30 days missing']) },
  { station: UNRANKED, minima: sampleMinima(0, []) },
];

test('minima as CSV have one row a station and year, and no date where there is no minimum', () => {
  expect(minimaProduct('csv', stations, from)).toBe(
    'station_code,year,usable,missing_days,minimum_m3s,date,reason,flagged_days\r\n' +
      '007,1990,true,0,0.5,1997-05-19,,2\r\n' +
      '007,1991,false,1,,,30 days missing,2\r\n',
  );
});

test('minima as JSON list every station, also one without years', () => {
  const product = JSON.parse(minimaProduct('json', stations, from));
  expect(product.stations).toHaveLength(2);
  expect(product.stations[0].years[1]).toMatchObject({ year: 1991, usable: false, minimum_m3s: null, date: null });
  expect(product.stations[1].years).toEqual([]);
});

const curves = {
  kind: 'period',
  unit: 'L/s/km²',
  exceedances: Float64Array.of(0.1, 0.95),
  curves: [{ station: RANKED, flows: Float64Array.of(12.5, Number.NaN), days: 365, years: 1 }],
  leftOut: [{ station: UNRANKED, reason: 'no drainage area is known' }],
  band: { p10: Float64Array.of(1, 2), p50: Float64Array.of(1, 2), p90: Float64Array.of(1, 2) },
};

test('curves as CSV are long, with an empty flow outside the plotting positions', () => {
  expect(curvesProduct('csv', curves, from)).toBe(
    'station_code,exceedance,flow,unit\r\n007,0.1,12.5,L/s/km²\r\n007,0.95,,L/s/km²\r\n',
  );
});

test('curves as JSON name the stations that are left out, with the reason', () => {
  const product = JSON.parse(curvesProduct('json', curves, from));
  expect(product.curves[0]).toEqual({ station_code: '007', days: 365, years: 1, flows: [12.5, null] });
  expect(product.left_out).toEqual([{ station_code: 'B 2', reason: 'no drainage area is known' }]);
});

test('stations as CSV can be read back as a registry', () => {
  expect(stationsProduct('csv', [UNRANKED])).toBe(
    'station_code,station_name,river,latitude,longitude,drainage_area_km2,influence\r\nB 2,Birch,Wethe,,,,spring-fed\r\n',
  );
});
