import { describe, expect, test } from 'vitest';
import { inspectFile } from '../../../../lib/intake/inspect-file.ts';
import { FLAG } from '../../../../lib/series/daily-series.ts';
import { read, refusal, withFile } from '../reading.ts';

/** A series as the tests need it; both forms of a response are written from it. */
interface Series {
  site?: string;
  name?: string;
  parameter?: string;
  description?: string;
  variableName?: string;
  unit?: string;
  statistic?: [code: string, words: string];
  values: [time: string, value: string, qualifiers?: string[]][];
  qualifiers?: [code: string, words: string][];
}

const complete = (series: Series) => ({
  ...{ site: '0306', name: 'Mill, at bridge', parameter: '00060', description: 'Discharge, cubic feet per second' },
  ...{ variableName: 'Streamflow, ft&#179;/s', unit: 'ft3/s', statistic: ['00003', 'Mean'] as [string, string] },
  ...{ qualifiers: [] as [string, string][], ...series },
});
const escaped = (text: string) => text.replaceAll('&', '&amp;').replaceAll('<', '&lt;');

/** WaterML 1.1 as XML (CUAHSI, 2009). */
function xml(...all: Series[]): string {
  const series = all
    .map(complete)
    .map(
      (one) =>
        `<ns1:timeSeries name="USGS:${one.site}:${one.parameter}:${one.statistic[0]}"><ns1:sourceInfo xsi:type="ns1:SiteInfoType"><ns1:siteName>${escaped(one.name)}</ns1:siteName><ns1:siteCode network="NWIS">${one.site}</ns1:siteCode><ns1:geoLocation><ns1:geogLocation srs="EPSG:4326"><ns1:latitude>38.9</ns1:latitude><ns1:longitude>-75.7</ns1:longitude></ns1:geogLocation></ns1:geoLocation></ns1:sourceInfo><ns1:variable><ns1:variableCode>${one.parameter}</ns1:variableCode><ns1:variableName>${escaped(one.variableName)}</ns1:variableName><ns1:variableDescription>${escaped(one.description)}</ns1:variableDescription><ns1:unit><ns1:unitCode>${escaped(one.unit)}</ns1:unitCode></ns1:unit><ns1:options><ns1:option name="Statistic" optionCode="${one.statistic[0]}">${one.statistic[1]}</ns1:option></ns1:options><ns1:noDataValue>-999999.0</ns1:noDataValue></ns1:variable><ns1:values>${one.values
          .map(
            ([time, value, codes = []]) =>
              `<ns1:value qualifiers="${codes.join(' ')}" dateTime="${time}">${value}</ns1:value>`,
          )
          .join('')}${one.qualifiers
          .map(
            ([code, words]) =>
              `<ns1:qualifier qualifierID="0"><ns1:qualifierCode>${code}</ns1:qualifierCode><ns1:qualifierDescription>${words}</ns1:qualifierDescription></ns1:qualifier>`,
          )
          .join('')}<ns1:method methodID="2"/></ns1:values></ns1:timeSeries>`,
    );
  return `<?xml version="1.0" encoding="UTF-8"?><ns1:timeSeriesResponse xmlns:ns1="http://www.cuahsi.org/waterML/1.1/" xmlns:xsi="http://www.w3.org/2001/XMLSchema-instance"><ns1:queryInfo><ns1:note title="filter:sites">[ALL]</ns1:note></ns1:queryInfo>${series.join('')}</ns1:timeSeriesResponse>`;
}

/** The same as JSON. */
function json(...all: Series[]): string {
  const timeSeries = all.map(complete).map((one) => ({
    sourceInfo: {
      siteName: one.name,
      siteCode: [{ value: one.site, network: 'NWIS', agencyCode: 'USGS' }],
      geoLocation: { geogLocation: { srs: 'EPSG:4326', latitude: 38.9, longitude: -75.7 }, localSiteXY: [] },
    },
    variable: {
      variableCode: [{ value: one.parameter, network: 'NWIS' }],
      ...{ variableName: one.variableName, variableDescription: one.description, unit: { unitCode: one.unit } },
      options: { option: [{ value: one.statistic[1], name: 'Statistic', optionCode: one.statistic[0] }] },
      noDataValue: -999999,
    },
    values: [
      {
        value: one.values.map(([dateTime, value, qualifiers = []]) => ({ value, qualifiers, dateTime })),
        qualifier: one.qualifiers.map(([qualifierCode, qualifierDescription]) => ({
          qualifierCode,
          qualifierDescription,
        })),
        method: [{ methodDescription: '', methodID: 2 }],
      },
    ],
    name: `USGS:${one.site}:${one.parameter}:${one.statistic[0]}`,
  }));
  return JSON.stringify({ name: 'ns1:timeSeriesResponseType', value: { queryInfo: { note: [] }, timeSeries } });
}

const day = (at: number) => `2020-02-${String(at).padStart(2, '0')}T00:00:00.000`;
const flow: Series = {
  values: [
    [day(27), '466', ['P']],
    [day(28), '362', ['A', 'e']],
    [day(29), '-999999', ['P', 'Ice']],
  ],
  qualifiers: [
    ['P', 'Provisional data subject to revision.'],
    ['e', 'Value has been estimated.'],
  ],
};
const temperature: Series = {
  ...{ parameter: '00010', description: 'Temperature, water, degrees Celsius', unit: 'deg C' },
  values: [[day(27), '8.1']],
};

describe.each([
  ['waterml-1', xml],
  ['waterml-json', json],
] as const)('%s', (layout, text) => {
  test('daily means of discharge are read with their qualifiers and the station’s facts', async () => {
    const { parts, report } = await read(text(flow));
    expect(report).toMatchObject({ layout, unit: 'ft3/s', rows: 3, accepted: 3 });
    expect(report.facts).toEqual([{ code: '0306', name: 'Mill, at bridge', latitude: 38.9, longitude: -75.7 }]);
    const [part] = parts;
    expect([part.code, ...part.values]).toEqual(['0306', 466, 362, Number.NaN]);
    expect([...part.codes].map((code) => part.codeList[code])).toEqual([
      { text: 'P', bits: FLAG.provisional },
      { text: 'A e', bits: FLAG.estimated },
      { text: 'P Ice', bits: FLAG.provisional | FLAG.ice, valueText: '-999999' },
    ]);
  });

  test('a qualifier that only its explanation makes plain is understood by it', async () => {
    const { parts } = await read(
      text({ values: [[day(1), '1', ['X7']]], qualifiers: [['X7', 'Estimated from a neighbour']] }),
    );
    expect(parts[0].codeList).toEqual([{ text: 'X7', bits: FLAG.estimated }]);
  });

  test('of several series the daily mean flow is read; others are offered, empty ones counted', async () => {
    const document = text(
      { ...temperature, values: [] },
      temperature,
      { ...flow, statistic: ['00001', 'Maximum'] },
      flow,
      { ...flow, site: '0400', name: 'Weir' },
    );
    const { parts, report } = await read(document);
    expect(parts.map(({ code }) => code)).toEqual(['0306', '0400']);
    expect(report.warnings).toEqual([
      '1 series without values were left out.',
      'Not read: Temperature, water, degrees Celsius; Discharge, cubic feet per second, Maximum.',
    ]);
    const { others, understood } = await withFile(document, (path) => inspectFile(path, { fileName: 'dv' }));
    expect(others.map(({ quantity, unit }) => [quantity, unit])).toEqual([
      [null, null],
      ['flow', 'ft3/s'],
    ]);
    expect(understood[0]).toEqual({
      ...{ row: 1, station: '0306', date: '2020-02-27', value: 466, flag: 'P', bits: FLAG.provisional, problem: null },
    });
  });

  test('a unit that stands only in the escaped name of the variable is found there', async () => {
    expect((await read(text({ ...flow, unit: '' }))).report.unit).toBe('ft3/s');
  });

  test('readings of the moment ask for their daily means', async () => {
    const readings: Series = {
      statistic: ['00000', ''],
      values: Array.from({ length: 96 }, (_, at): [string, string] => [
        `2012-05-12T${String(Math.floor(at / 4)).padStart(2, '0')}:${String((at % 4) * 15).padStart(2, '0')}:00.000-05:00`,
        String(at),
      ]),
    };
    expect((await refusal(text(readings))).problem).toMatchObject({ needs: 'daily-mean' });
    // By hand: (0 + 1 + … + 95) / 96 = 47.5.
    expect((await read(text(readings), { mapping: { dailyMean: 1 } })).days).toEqual({ '2012-05-12': [47.5, ''] });
  });

  test('a response of other parameters is refused by their names', async () => {
    expect((await refusal(text(temperature))).problem.value).toBe('Temperature, water, degrees Celsius');
  });

  test('a response without any value is refused', async () => {
    expect((await refusal(text({ values: [] }))).message).toMatch(/none of its 1 series has a value/);
  });

  test('a response that is cut short is refused', async () => {
    const whole = text(flow);
    expect((await refusal(whole.slice(0, whole.length - 40))).message).toMatch(/cut short|not well-formed/);
  });
});

test.each([
  ['lists far too deep', `{"timeSeriesResponse":${'['.repeat(5000)}${']'.repeat(5000)}}`, /more than 200 deep/],
  ['an endless text', `{"timeSeriesResponse":"${'x'.repeat(3 << 20)}"}`, /longer than 1024 kB/],
  ['no JSON', '{"timeSeriesResponse":!}', /not well-formed JSON/],
  [
    'values before what they are of',
    '{"timeSeries":[{"values":[{"value":[{"value":"1","dateTime":"2020-01-01"}]}],"variable":{}}]}',
    /before it says what they are of/,
  ],
  [
    'names of a prototype',
    '{"timeSeries":[{"__proto__":{"sourceInfo":1},"sourceInfo":{"__proto__":1},"variable":null,"values":7}]}',
    /gives no daily flow|none of its/,
  ],
])('JSON of %s is refused', async (_what, text, message) => {
  expect((await refusal(text)).message).toMatch(message);
});
