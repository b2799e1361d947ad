import { gzipSync } from 'node:zlib';
import { strToU8, zipSync } from 'fflate';
import { isoDate } from '../../../lib/calendar/day.ts';
import type { Mapping } from '../../../lib/intake/types.ts';
import { DATE_AT_START } from '../../fixed-width.ts';
import { LAYER } from '../../integration/jobs/sample-files.ts';

/** A small good file of some layout, to be spoilt. */
export interface SeedFile {
  name: string;
  bytes: Uint8Array;
  /** what a person would say of it beside its unit */
  mapping?: Partial<Mapping>;
}

const DAYS = 40;
const FIRST_DAY = 4018;
const flowOf = (day: number): string => (((day * 37) % 91) / 7 + 0.13).toFixed(2);
const days = Array.from({ length: DAYS }, (_, at) => FIRST_DAY + at);
const text = (name: string, lines: readonly string[], end = '\n'): SeedFile => ({
  name,
  bytes: strToU8(lines.join(end) + end),
});
const parts = (day: number): string[] => isoDate(day).split('-');

const long = text('long.csv', [
  'station,date,flow_m3s,flag',
  ...days.flatMap((day) => ['0012', 'Süd 2'].map((code) => `${code},${isoDate(day)},${flowOf(day)},A`)),
]);
const wide = text('wide.csv', [
  'date;0101;0102;0103',
  ...days.map((day) => `${parts(day).reverse().join('.')};${flowOf(day).replace('.', ',')};;${day % 9}`),
]);
const agency = text('agency.txt', [
  '# a heading',
  'agency_cd\tsite_no\tdatetime\t1_00060_00003\t1_00060_00003_cd\t2_00065_00003\t2_00065_00003_cd',
  '5s\t15s\t20d\t14n\t10s\t14n\t10s',
  ...days.map((day) => `AG\t01234500\t${isoDate(day)}\t${flowOf(day)}\tA\t1.2\tP`),
]);
const blanks = text(
  'blanks.txt',
  days.map((day) => `01234500 ${parts(day).join(' ')} ${flowOf(day).padStart(9)} A`),
);
const fixed: SeedFile = {
  mapping: {
    layout: 'fixed-width',
    date: DATE_AT_START,
    value: { slice: [8, 18] },
  },
  ...text(
    'fixed.dly',
    days.map((day) => {
      const [year, month, date] = parts(day);
      return `${year}${String(Number(month)).padStart(2)}${String(Number(date)).padStart(2)}${flowOf(day).padStart(10)}`;
    }),
    '\r\n',
  ),
};
const dayHeadings = Array.from({ length: 31 }, (_, at) => String(at + 1));
const monthRows = text('months.csv', [
  ['station', 'year', 'month', ...dayHeadings].join(','),
  ...Array.from({ length: 14 }, (_, at) => {
    const [year, month] = [1981 + Math.floor(at / 12), (at % 12) + 1];
    const length = new Date(Date.UTC(year, month, 0)).getUTCDate();
    return [
      'A1',
      year,
      month,
      ...dayHeadings.map((day) => (Number(day) > length ? '' : flowOf(at + Number(day)))),
    ].join(',');
  }),
]);
const monthNames = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];
const dayRows = text('year-book.csv', [
  'Station: 4711',
  'Year 1981',
  ['Day', ...monthNames].join(';'),
  ...dayHeadings.map((day) =>
    [
      day,
      ...monthNames.map((_, month) =>
        Number(day) > new Date(Date.UTC(1981, month + 1, 0)).getUTCDate() ? '' : flowOf(month * 31 + Number(day)),
      ),
    ].join(';'),
  ),
]);
const headed = text('headed.csv', [
  '# Station: 4711; River: Lauch',
  '# Latitude: 50.2',
  '# Longitude: 7.1',
  '# Catchment area: 120 km2',
  '# Unit: m3/s',
  'YYYY-MM-DD;hh:mm;Value',
  ...days.map((day) => `${isoDate(day)};--:--;${flowOf(day)}`),
]);
const hourly = text('hourly.csv', [
  'timestamp,discharge (L/s)',
  ...days.flatMap((day) => ['00', '06', '12', '18'].map((hour) => `${isoDate(day)}T${hour}:00:00Z,${flowOf(day)}`)),
]);
const registry = text('stations.csv', [
  'station_id,name,river,latitude,longitude,drainage_area_km2,influence,legal_minimum_m3s',
  'A1,Alder Mill,Wethe,50.1,7.1,120,natural,0.4',
  'B2,"Birch, Ford",Wethe,50.2,7.2,340,regulated,',
]);
const geojson = (features: object[], name: string): SeedFile =>
  text(name, [JSON.stringify({ type: 'FeatureCollection', features })]);
const points = geojson(
  [
    {
      type: 'Feature',
      properties: { code: 'A1', name: 'Alder Mill', area_km2: 120 },
      geometry: { type: 'Point', coordinates: [7.1, 50.1] },
    },
  ],
  'stations.geojson',
);
const lines = text('rivers.geojson', [LAYER]);

/** WaterML 2.0 (OGC 10-126r4), as short as it can be. */
const waterml2 = text('series.xml', [
  '<?xml version="1.0" encoding="UTF-8"?>',
  '<wml2:Collection gml:id="c" xmlns:wml2="http://www.opengis.net/waterml/2.0" xmlns:gml="http://www.opengis.net/gml/3.2"',
  ' xmlns:om="http://www.opengis.net/om/2.0" xmlns:xlink="http://www.w3.org/1999/xlink"><wml2:observationMember>',
  '<om:OM_Observation gml:id="o"><om:observedProperty xlink:title="Discharge"/>',
  '<om:featureOfInterest xlink:title="Alder Mill" xlink:href="#A1"/><om:result><wml2:MeasurementTimeseries gml:id="t">',
  '<wml2:defaultPointMetadata><wml2:DefaultTVPMeasurementMetadata><wml2:uom code="m3/s"/>',
  '</wml2:DefaultTVPMeasurementMetadata></wml2:defaultPointMetadata>',
  ...days.map(
    (day) =>
      `<wml2:point><wml2:MeasurementTVP><wml2:time>${isoDate(day)}</wml2:time><wml2:value>${flowOf(day)}</wml2:value></wml2:MeasurementTVP></wml2:point>`,
  ),
  '</wml2:MeasurementTimeseries></om:result></om:OM_Observation></wml2:observationMember></wml2:Collection>',
]);
const waterml1Series = (value: string) => ({
  sourceInfo: { siteName: 'Alder Mill', siteCode: [{ value: '01234500' }] },
  variable: {
    variableCode: [{ value: '00060' }],
    variableName: 'Streamflow, ft&#179;/s',
    unit: { unitCode: 'ft3/s' },
    options: { option: [{ name: 'Statistic', optionCode: '00003' }] },
    noDataValue: -999999,
  },
  values: [{ value: days.map((day) => ({ value, qualifiers: ['A'], dateTime: `${isoDate(day)}T00:00:00.000` })) }],
});
const watermlJson = text('series.json', [
  JSON.stringify({ name: 'ns1:timeSeriesResponseType', value: { timeSeries: [waterml1Series('12.5')] } }),
]);
const waterml1 = text('series-1.xml', [
  '<?xml version="1.0"?><timeSeriesResponse xmlns="http://www.cuahsi.org/waterML/1.1/"><timeSeries><sourceInfo>',
  '<siteName>Alder Mill</siteName><siteCode>01234500</siteCode></sourceInfo><variable><variableCode>00060</variableCode>',
  '<variableName>Streamflow</variableName><unit><unitCode>ft3/s</unitCode></unit><options><option name="Statistic"',
  ' optionCode="00003">Mean</option></options><noDataValue>-999999</noDataValue></variable><values>',
  ...days.map((day) => `<value qualifiers="A" dateTime="${isoDate(day)}T00:00:00">${flowOf(day)}</value>`),
  '</values></timeSeries></timeSeriesResponse>',
]);

/** A workbook of one sheet, by hand: the least that the standard asks for (ECMA-376). */
function workbook(): SeedFile {
  const cell = (value: string, column: number, row: number): string => {
    const place = `${String.fromCharCode(65 + column)}${row}`;
    const number = /^-?[\d.]+$/.test(value);
    return number
      ? `<c r="${place}"><v>${value}</v></c>`
      : `<c r="${place}" t="inlineStr"><is><t>${value}</t></is></c>`;
  };
  const table = [['date', 'flow_m3s'], ...days.map((day) => [isoDate(day), flowOf(day)])];
  const rows = table.map(
    (fields, at) => `<row r="${at + 1}">${fields.map((text, c) => cell(text, c, at + 1)).join('')}</row>`,
  );
  const main = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';
  const relations = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
  const file = (body: string) => strToU8(`<?xml version="1.0" encoding="UTF-8"?>${body}`);
  const link = (type: string, target: string) =>
    `<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships"><Relationship Id="r1" Type="${relations}/${type}" Target="${target}"/></Relationships>`;
  return {
    name: 'book.xlsx',
    bytes: zipSync({
      '[Content_Types].xml': file(
        '<Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types"><Default Extension="xml" ContentType="application/xml"/></Types>',
      ),
      '_rels/.rels': file(link('officeDocument', 'xl/workbook.xml')),
      'xl/workbook.xml': file(
        `<workbook xmlns="${main}" xmlns:r="${relations}"><sheets><sheet name="Flows" sheetId="1" r:id="r1"/></sheets></workbook>`,
      ),
      'xl/_rels/workbook.xml.rels': file(link('worksheet', 'worksheets/sheet1.xml')),
      'xl/worksheets/sheet1.xml': file(
        `<worksheet xmlns="${main}"><sheetData>${rows.join('')}</sheetData></worksheet>`,
      ),
    }),
  };
}

/** A good file of every layout that is read. */
export const SEED_FILES: readonly SeedFile[] = [
  ...[long, wide, agency, blanks, fixed, monthRows, dayRows, headed, hourly, registry, points, lines],
  ...[waterml2, waterml1, watermlJson, workbook()],
  { name: 'long.csv.gz', bytes: gzipSync(long.bytes) },
  { name: 'two.zip', bytes: zipSync({ 'a/long.csv': long.bytes, 'wide.csv': wide.bytes }) },
  { name: 'stored.zip', bytes: zipSync({ 'long.csv': long.bytes }, { level: 0 }) },
];
