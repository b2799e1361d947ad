import { createHash } from 'node:crypto';
import { describe, expect, test } from 'vitest';
import { FLAG } from '../../../lib/series/daily-series.ts';
import { dates, daysOf, read, refusal } from './reading.ts';

describe('long tables', () => {
  test('readFlows reads station, date, flow, flag: values and flags as written, unit from the heading', async () => {
    const text = 'station,date,flow_cfs,flag\n007,2001-03-01,1.50,A\n007,2001-03-02,,M\n8,2001-03-01,0,P:e\n';
    const { report, parts } = await read(text);
    expect(report).toMatchObject({
      layout: 'long',
      unit: 'ft3/s',
      rows: 3,
      accepted: 3,
      rejectedTotal: 0,
      rejected: [],
    });
    expect(parts.map(({ code }) => code)).toEqual(['007', '8']);
    expect(daysOf(parts[0])).toEqual({ '2001-03-01': [1.5, 'A'], '2001-03-02': [NaN, 'M'] });
    expect(parts[1].codeList).toEqual([{ text: 'P:e', bits: FLAG.provisional | FLAG.estimated }]);
    expect(report.stations).toEqual([
      {
        ...{
          code: '007',
          values: 1,
          missing: 1,
          first: '2001-03-01',
          last: '2001-03-01',
          zeros: 0,
          min: 1.5,
          max: 1.5,
        },
        ...{ gaps: 0, longestGapDays: 0, duplicates: 0 },
      },
      {
        ...{ code: '8', values: 1, missing: 0, first: '2001-03-01', last: '2001-03-01', zeros: 1, min: 0, max: 0 },
        ...{ gaps: 0, longestGapDays: 0, duplicates: 0 },
      },
    ]);
    expect(report.sha256).toBe(createHash('sha256').update(text).digest('hex'));
  });

  test('readFlows takes the station of a file without one from its name, or as given', async () => {
    const text = 'date,flow_m3s\n2001-03-01,1\n';
    expect((await read(text, { fileName: 'folder/A7.1.csv' })).parts[0].code).toBe('A7.1');
    expect((await read(text, { station: 'B2' })).parts[0].code).toBe('B2');
    const knownStations = [{ code: '151817001', name: 'Ower' }];
    expect((await read(text, { fileName: 'ower.csv', knownStations })).parts[0].code).toBe('151817001');
  });

  test.each([
    [
      'semicolons, decimal commas, D.M.Y, CRLF, title lines',
      'Pegel:;Süd\r\nDatum;Abfluss [m³/s]\r\n30.01.2001;2,5\r\n31.01.2001;0,125\r\n',
    ],
    ['tabs, M/D/Y', 'date\tflow_m3s\n1/30/2001\t2.5\n1/31/2001\t0.125\n'],
    ['quoted fields', '"date","Flow (m3/s)"\n"2001-01-30","2.5"\n"2001-01-31","0.125"\n'],
    ['no header', '2001-01-30,2.5\n2001-01-31,0.125\n'],
    ['UTF-8 mark and no last line end', '\uFEFFdate,flow_m3s\n2001-01-30,2.5\n2001-01-31,0.125'],
    ['unpadded Y/M/D, blank lines, trailing delimiters', 'date,flow_m3s\n2001/1/30,2.5,\n\n2001/1/31,0.125,\n,\n'],
    ['comment lines', '# discharge, m3/s\ndate,q\n2001-01-30,2.5\n# a note\n2001-01-31,0.125\n'],
    ['carriage returns alone', 'date,flow_m3s\r2001-01-30,2.5\r2001-01-31,0.125\r'],
    ['year, month, day columns', 'year,month,day,flow_m3s\n2001,1,30,2.5\n2001,01,31,0.125\n'],
    ['times of day', 'datetime,flow_m3s\n2001-01-30T00:00:00Z,2.5\n2001-01-31T00:00:00Z,0.125\n'],
    ['a column of units', 'date,value,unit\n2001-01-30,2.5,m3/s\n2001-01-31,0.125,m3/s\n'],
    [
      'headings of an agency’s series among commas',
      'site,Date,X_00060_00003,X_00060_00003_cd\ng,2001-01-30,2.5,\ng,2001-01-31,0.125,\n',
    ],
    ['blank-padded rows with a header', 'year month day flow_m3s\n2001  1 30  2.5\n2001  1 31  0.125\n'],
    ['a spreadsheet’s sep= line', 'sep=;\ndate;flow_m3s\n2001-01-30;2,5\n2001-01-31;0,125\n'],
    ['rows out of order', 'date,flow_m3s\n2001-01-31,0.125\n2001-01-30,2.5\n'],
  ])('readFlows reads %s', async (_, text) => {
    const { report, days } = await read(text, /no header/.test(_) ? { unit: 'm3/s' } : {});
    expect(report).toMatchObject({ unit: /agency/.test(_) ? 'ft3/s' : 'm3/s', rows: 2, accepted: 2 });
    expect(days).toEqual({ '2001-01-30': [2.5, ''], '2001-01-31': [0.125, ''] });
  });

  test('readFlows tolerates Latin-1 station names', async () => {
    const text = Buffer.from('station,date,flow_m3s\nMühlbach,2001-01-01,1\n', 'latin1');
    expect((await read(text)).parts[0].code).toBe('Mühlbach');
  });

  test('readFlows leaves other quantities of a mixed file out, and says how many rows', async () => {
    const text = [
      'Daily Discharge (m3/s) (PARAM = 1) and Daily Water Level (m) (PARAM = 2)',
      ' ID,PARAM,Date,Value,SYM',
      ...['X1,1,1914/06/15,4.53,', 'X1,2,1914/06/15,1.01,', 'X1,1,1914/06/16,3.96,B'],
    ].join('\n');
    const { report, parts } = await read(text);
    expect(report).toMatchObject({ rows: 2, accepted: 2, unit: 'm3/s' });
    expect(report.warnings).toContain('1 rows of other quantities were left out.');
    expect(parts[0].codeList[1]).toEqual({ text: 'B', bits: FLAG.ice });
  });

  test('readFlows merges stations that come back, and dates in any mixture', async () => {
    const text = 'code,date,flow_m3s\nA,2001-01-01,1\nB,2001-01-01,5\nA,2001-01-02,2\nB,2001-01-03,6\nA,2000-12-31,3\n';
    const { parts } = await read(text);
    expect(parts.map(({ code }) => code)).toEqual(['A', 'B']);
    expect(Object.keys(daysOf(parts[0]))).toEqual(['2000-12-31', '2001-01-01', '2001-01-02']);
  });
});

describe('wide tables', () => {
  test('readFlows takes each column of a wide table for the station in its heading', async () => {
    const text = 'date,01013500,Mill B\n2001-01-01,1.5,\n2001-01-02,NA,7\n';
    const { report, parts } = await read(text, { unit: 'm3/s' });
    expect(report).toMatchObject({ layout: 'wide', rows: 2, accepted: 2 });
    expect(parts.map(({ code }) => code)).toEqual(['01013500', 'Mill B']);
    expect(daysOf(parts[0])).toEqual({ '2001-01-01': [1.5, ''], '2001-01-02': [NaN, 'NA'] });
    expect(daysOf(parts[1])).toEqual({ '2001-01-01': [NaN, ''], '2001-01-02': [7, ''] });
  });

  test('readFlows takes a unit that all headings share, and flag columns behind their stations', async () => {
    const { report, parts } = await read('date,A1 (L/s),A1_flag,B2 (L/s),B2_flag\n2001-01-01,1,e,2,A\n');
    expect(report.unit).toBe('L/s');
    expect(parts.map(({ code, codeList }) => [code, codeList[0].text])).toEqual([
      ['A1', 'e'],
      ['B2', 'A'],
    ]);
  });

  test('readFlows matches headings to the registry by code, then by name', async () => {
    const knownStations = [
      { code: 'N1', name: 'North' },
      { code: 'S1', name: 'South' },
    ];
    const { parts } = await read('date,North,S1\n2001-01-01,1,2\n', { unit: 'm3/s', knownStations });
    expect(parts.map(({ code }) => code)).toEqual(['N1', 'S1']);
  });

  test('readFlows rejects a wide row by its bad field and takes the other stations’ values', async () => {
    const { report, parts } = await read('date,A1,B2\n2001-01-01,abc,2\n2001-01-02,3,4\n', { unit: 'm3/s' });
    expect(report).toMatchObject({ rows: 2, accepted: 1, rejectedTotal: 1 });
    expect(report.rejected[0]).toEqual({
      row: 2,
      text: '2001-01-01,abc,2',
      reason: "“abc” at A1 is not a flow (the row's other values were taken)",
    });
    expect(Object.keys(daysOf(parts[1]))).toEqual(['2001-01-01', '2001-01-02']);
  });
});

describe('agency tables', () => {
  const header = 'agency_cd\tsite_no\tdatetime\t99_00060_00003\t99_00060_00003_cd\n5s\t15s\t20d\t14n\t10s\n';

  test('readFlows reads comments, header, width row and qualifiers; parameter 00060, statistic 00003 is ft³/s', async () => {
    const text = `# a note\n#\n${header}XY\t0306\t1946-03-03\t122\tA\nXY\t0306\t1946-03-04\t\t\nXY\t0306\t1946-03-05\tIce\tP\n`;
    const { report, days, parts } = await read(text);
    expect(report).toMatchObject({ layout: 'agency-tab', unit: 'ft3/s', rows: 3, accepted: 3 });
    expect(days).toEqual({ '1946-03-03': [122, 'A'], '1946-03-04': [NaN, ''], '1946-03-05': [NaN, 'P'] });
    expect(parts[0].codeList[2]).toEqual({ text: 'P', bits: FLAG.provisional | FLAG.ice, valueText: 'Ice' });
  });

  test('readFlows follows a header that comes back with other series for the next station', async () => {
    const other = header
      .replaceAll('99_', '1234_')
      .replace('datetime\t', 'datetime\t7_00065_00003\t')
      .replace('20d\t', '20d\t14n\t');
    const text = `# one\n${header}XY\t1\t1946-03-03\t5\tA\n# two\n${other}XY\t2\t1946-03-03\t88\t6\te\n`;
    const { report, parts } = await read(text);
    expect(report).toMatchObject({ rows: 2, accepted: 2, rejected: [] });
    expect(parts.map(({ code, values, codeList }) => [code, values[0], codeList[0].text])).toEqual([
      ['1', 5, 'A'],
      ['2', 6, 'e'],
    ]);
  });

  test('readFlows asks which series to take where none is daily mean discharge', async () => {
    const error = await refusal(`# x\n${header.replaceAll('00003', '00001')}XY\t1\t1946-03-03\t5\tA\n`);
    expect(error.problem.needs).toBe('mapping');
  });
});

describe('rows without a header', () => {
  test('readFlows reads blank-padded rows of station, year, month, day, flow, flag', async () => {
    const text = '0101 1993 09 29   514.00 A\n0101 1993 09 30  -999.00 M\n0101 1993 10 01     0.00 A:e';
    const { report, days, parts } = await read(text, { unit: 'ft3/s' });
    expect(report).toMatchObject({ layout: 'whitespace', rows: 3, accepted: 3 });
    expect(days).toEqual({ '1993-09-29': [514, 'A'], '1993-09-30': [NaN, 'M'], '1993-10-01': [0, 'A:e'] });
    expect(parts[0].codeList[1]).toEqual({ text: 'M', bits: 0, valueText: '-999.00' });
    expect(report.warnings[0]).toMatch(/no line end/);
  });

  const fixed = dates('1948-01-01', 40)
    .map((date, at) => {
      const [year, month, day] = date.split('-').map(Number);
      const numbers = [at / 10, 0.46, at === 39 ? -99 : at / 4, -16.0722].map((value) => value.toFixed(4).padStart(10));
      return `${year}${String(month).padStart(2)}${String(day).padStart(2)}${numbers.join('')}`;
    })
    .join('\r\n');

  test('readFlows asks which numbers of a fixed-width file are the flows, and never guesses', async () => {
    const error = await refusal(fixed);
    expect(error.problem).toMatchObject({ needs: 'mapping', file: 'gauge.csv' });
  });

  test('readFlows reads fixed-width rows by a partial mapping', async () => {
    const { report, days } = await read(fixed, {
      fileName: 'G1.dly',
      mapping: { value: { slice: [28, 38] } },
      unit: 'mm/d',
    });
    expect(report).toMatchObject({ layout: 'fixed-width', unit: 'mm/d', rows: 40, accepted: 40 });
    expect(report.mapping.date.columns).toEqual([
      [0, 4],
      [4, 6],
      [6, 8],
    ]);
    expect(days['1948-01-02']).toEqual([0.25, '']);
    expect(days['1948-02-09']).toEqual([NaN, '-99.0000']);
    expect(report.stations[0]).toMatchObject({ code: 'G1', values: 39, missing: 1, zeros: 1 });
  });
});

describe('what rows say', () => {
  const rows = (...lines: string[]) => `date,flow_m3s\n${lines.join('\n')}\n`;

  test('readFlows reads `<0.5` as 0.5 below detection, and keeps the mark', async () => {
    const { parts } = await read(rows('2001-01-01,<0.5', '2001-01-02,< 0.25'));
    expect([...parts[0].values]).toEqual([0.5, 0.25]);
    expect(parts[0].codeList).toEqual([{ text: '<', bits: FLAG['below-detection'], valueText: '<' }]);
  });

  test('readFlows takes negative values as written, with a warning', async () => {
    const { report, days } = await read(rows('2001-01-01,-0.5', '2001-01-02,-0'));
    expect(days['2001-01-01']).toEqual([-0.5, '']);
    expect(Object.is(days['2001-01-02'][0], 0)).toBe(true);
    expect(report.warnings).toContain('1 values are negative; they were taken as written.');
  });

  test('readFlows says which number it took for missing', async () => {
    const { report } = await read(rows('2001-01-01,-999', '2001-01-02,-999', '2001-01-03,1'));
    expect(report.warnings).toContain('“-999” was read as missing, on 2 station days.');
    expect(report.stations[0]).toMatchObject({ values: 1, missing: 2, first: '2001-01-03' });
  });

  test('readFlows takes missing codes from the mapping, numbers by their value', async () => {
    const { days } = await read(rows('2001-01-01,9999.0', '2001-01-02,gone', '2001-01-03,2'), {
      mapping: { missing: ['9999', 'Gone'] },
    });
    expect(Object.values(days).map(([value]) => value)).toEqual([NaN, NaN, 2]);
  });

  test('readFlows counts gaps between the first value and the last, absent days and missing values alike', async () => {
    const { report } = await read(
      rows('2001-01-01,', '2001-01-02,1', '2001-01-03,', '2001-01-05,2', '2001-01-06,', '2001-01-07,3', '2001-01-09,'),
    );
    expect(report.stations[0]).toMatchObject({
      ...{ values: 3, missing: 4, first: '2001-01-02', last: '2001-01-07', gaps: 2, longestGapDays: 2 },
    });
  });

  test('readFlows merges repeated days with equal values and counts them', async () => {
    const { report } = await read(
      'date,flow_m3s,flag\n2001-01-01,1.0,A\n2001-01-01,1.00,A\n2001-01-02,,\n2001-01-02,2,A\n2001-01-01,1,P\n',
    );
    expect(report).toMatchObject({ rows: 5, accepted: 5 });
    expect(report.stations[0]).toMatchObject({ values: 2, missing: 0, duplicates: 3 });
    expect(report.warnings).toContain('1 days stand twice with equal values; they were taken once.');
    expect(report.warnings).toContain('1 days stand twice, once with a value and once without; the value was taken.');
    expect(report.warnings).toContain(
      '1 days stand twice with equal values and unlike flags; the first flag was kept.',
    );
  });

  test('readFlows keeps 1,000 rejected rows in the report and hands on all of them', async () => {
    const bad = Array.from({ length: 1005 }, (_, at) => `2001-02-31,${at}`);
    const { report, rejected } = await read(rows('2001-01-01,1', ...bad));
    expect(report).toMatchObject({ rows: 1006, accepted: 1, rejectedTotal: 1005 });
    expect(report.rejected).toHaveLength(1000);
    expect(rejected).toHaveLength(1005);
    expect(rejected[1004].row).toBe(1007);
  });
});

test('readFlows reports progress up to the whole size, and stops with the signal’s reason', async () => {
  const text = `station,date,flow_m3s\n${dates('1900-01-01', 60000)
    .map((date) => `A,${date},1.5`)
    .join('\n')}\n${dates('1900-01-01', 60000)
    .map((date) => `B,${date},1.5`)
    .join('\n')}\n`;
  const seen: [number, number, number][] = [];
  await read(text, { onProgress: (...progress) => seen.push(progress) });
  expect(seen.length).toBeGreaterThan(1);
  expect(seen.at(-1)).toEqual([120000, text.length, text.length]);
  const reason = new Error('stopped');
  const abort = new AbortController();
  const reading = read(text, { signal: abort.signal, onProgress: () => abort.abort(reason) });
  await expect(reading).rejects.toBe(reason);
});

test('a mapping says what flags mean in its file, before what their words say', async () => {
  const text = 'date,flow_m3s,flag\n2001-01-01,1,B\n2001-01-02,2,E\n2001-01-03,Ice,\n2001-01-04,4,P\n';
  const { parts } = await read(text, { mapping: { flags: { B: ['ice', 'estimated'], E: [], Ice: ['suspect'] } } });
  const bits = Array.from(parts[0].codes, (code) => parts[0].codeList[code].bits);
  expect(bits).toEqual([FLAG.ice | FLAG.estimated, 0, FLAG.suspect, FLAG.provisional]);
});
