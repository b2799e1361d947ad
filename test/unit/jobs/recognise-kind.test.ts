import { expect, test } from 'vitest';
import { recogniseKind } from '../../../lib/jobs/recognise-kind.ts';

const kind = (text: string) => recogniseKind(new TextEncoder().encode(text));

test.each([
  ['GeoJSON', '{"type": "FeatureCollection", "features": []}', 'layer'],
  ['GeoJSON behind a byte order mark and blank lines', '\uFEFF\n  {"type": "Feature"}', 'layer'],
  ['a table with latitude and longitude', 'code,name,latitude,longitude\nA,Alder,50.1,7.2\n', 'registry'],
  ['the same with semicolons and short names', 'id;lat;lon\n1;50,1;7,2\n2;50,3;7,4\n', 'registry'],
  ['stations with areas and without places', 'station_id,name,drainage_area_km2\nA,Alder,120\n', 'registry'],
  ['long flows', 'station,date,flow\nA,2001-01-01,3.5\nA,2001-01-02,3.4\n', 'flows'],
  ['long flows that carry the place of the station', 'id,lat,lon,date,flow\nA,50,7,2001-01-01,3.5\n', 'flows'],
  ['wide flows', 'date,A,B\n2001-01-01,1,2\n2001-01-02,1,2\n', 'flows'],
  ['rows without a header', '01013500 1993 09 29 350.00 A\n01013500 1993 09 30 340.00 A\n', 'flows'],
  [
    'an agency file',
    '# station\nagency_cd\tsite_no\tdatetime\t1_00060\n5s\t15s\t20d\t14n\nX\t1\t2001-01-01\t3\n',
    'flows',
  ],
  ['an empty file', '', 'flows'],
])('recogniseKind takes %s for what it is', (_what, text, expected) => {
  expect(kind(text)).toBe(expected);
});

test.each([
  ['WaterML 2.0', '<?xml version="1.0"?><wml2:Collection xmlns:wml2="http://www.opengis.net/waterml/2.0"/>', 'flows'],
  ['WaterML 1.1', '<ns1:timeSeriesResponse xmlns:ns1="http://www.cuahsi.org/waterML/1.1/"/>', 'flows'],
  ['WaterML 1.1 as JSON', '{"name":"ns1:timeSeriesResponseType","value":{"timeSeries":[]}}', 'flows'],
  [
    'GeoJSON of points',
    '{"type":"FeatureCollection","features":[{"type":"Feature","properties":{"code":"A"},"geometry":{"type":"Point","coordinates":[1,2]}}]}',
    'registry',
  ],
  [
    'GeoJSON of points and lines',
    '{"type":"FeatureCollection","features":[{"type":"Feature","geometry":{"type":"Point","coordinates":[1,2]}},{"type":"Feature","geometry":{"type":"LineString","coordinates":[[1,2],[3,4]]}}]}',
    'layer',
  ],
  ['GeoJSON of areas', '{"type":"Feature","geometry":{"type":"MultiPolygon","coordinates":[]}}', 'layer'],
  [
    'a list of stations under a title',
    'Stations of the Ribble,,\ncode,name,area km2\nA1,Mill,12\nB2,Weir,34\n',
    'registry',
  ],
])('recogniseKind tells %s by what it holds', (_what, text, expected) => {
  expect(kind(text)).toBe(expected);
});
