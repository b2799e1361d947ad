import { describe, expect, test } from 'vitest';
import { inspectFile } from '../../../../lib/intake/inspect-file.ts';
import { FLAG } from '../../../../lib/series/daily-series.ts';
import { daysOf, read, refusal, withFile } from '../reading.ts';
import { collection, daily, documentOf, point, type SeriesText } from './waterml-2-text.ts';

const inspect = (text: string) => withFile(text, (path) => inspectFile(path, { fileName: 'flows.xml' }));
const valuesOf = (days: Record<string, [number, string]>) =>
  Object.fromEntries(Object.entries(days).map(([day, [value]]) => [day, value]));

describe('days', () => {
  // OGC 10-126r4, interpolation types: AveragePrec is the average over the interval before the time, AverageSucc over the
  // interval behind it; with P1D that interval is a day.
  const stamped: [string, SeriesText, string, string][] = [
    ['a date alone names its own day', { points: [point('2001-03-01', '7')] }, '2001-03-01', 'date'],
    [
      'a mean of the preceding day at midnight belongs to the day before',
      { interpolation: 'AveragePrec', aggregation: 'P1D', points: [point('2001-03-01T00:00:00Z', '7')] },
      '2001-02-28',
      'end',
    ],
    [
      'a mean of the preceding day at 23:00 (midnight further east) belongs to that day',
      { interpolation: 'AveragePrec', aggregation: 'P1D', points: [point('2001-03-01T23:00:00Z', '7')] },
      '2001-03-01',
      'end',
    ],
    [
      'a mean of the preceding day given by its date alone belongs to that date',
      { interpolation: 'AveragePrec', aggregation: 'P1D', points: [point('2001-03-01', '7')] },
      '2001-03-01',
      'end',
    ],
    [
      'a mean of the succeeding day at midnight belongs to the day that begins',
      { interpolation: 'AverageSucc', aggregation: 'P1D', points: [point('2001-03-01T00:00:00+01:00', '7')] },
      '2001-03-01',
      'start',
    ],
    [
      'a mean of the succeeding day at 23:00 belongs to the next day',
      { interpolation: 'AverageSucc', aggregation: 'P1D', points: [point('2001-02-28T23:00:00Z', '7')] },
      '2001-03-01',
      'start',
    ],
    [
      '24:00 is the midnight that ends the day',
      { interpolation: 'AveragePrec', aggregation: 'P1D', points: [point('2001-02-28T24:00:00', '7')] },
      '2001-02-28',
      'end',
    ],
    [
      'points without a time follow the base time at equal steps',
      { spacing: { base: '2001-02-28T00:00:00', step: 'P1D' }, points: [point(null, '6'), point(null, '7')] },
      '2001-03-01',
      'spaced',
    ],
  ];
  test.each(stamped)('%s', async (_promise, series, expected) => {
    const { days } = await read(collection(series));
    expect(Object.entries(days).at(-1)).toEqual([expected, [7, '']]);
  });

  test('a preceding interval is named in the warnings', async () => {
    const series = { interpolation: 'AveragePrec', aggregation: 'P1D', points: [point('2001-03-01T00:00:00Z', '7')] };
    expect((await read(collection(series))).report.warnings.join()).toMatch(/midnight is that of the day before/);
  });

  test('a point with neither time nor value is left out and counted', async () => {
    const { days, report } = await read(collection({ points: [point(null, null), ...daily(['1', '2'])] }));
    expect(valuesOf(days)).toEqual({ '2001-01-01': 1, '2001-01-02': 2 });
    expect(report.rows).toBe(2);
    expect(report.warnings).toContain('1 points with neither time nor value were left out.');
  });

  test('several values a day are refused, and taken as means when asked to', async () => {
    const hours = Array.from({ length: 48 }, (_, hour) =>
      point(`2001-01-0${1 + Math.floor(hour / 24)}T${String(hour % 24).padStart(2, '0')}:00:00`, String(hour)),
    );
    const text = collection({ points: hours });
    const problem = await refusal(text, { fileName: 'flows.xml' });
    expect(problem.problem).toMatchObject({ needs: 'daily-mean', file: 'flows.xml' });
    expect((await inspect(text)).problems.map(({ problem }) => problem.needs)).toEqual(['daily-mean']);
    // By hand: (0 + … + 23) / 24 = 11.5, (24 + … + 47) / 24 = 35.5.
    const { days } = await read(text, { mapping: { dailyMean: 0.8 } });
    expect(valuesOf(days)).toEqual({ '2001-01-01': 11.5, '2001-01-02': 35.5 });
  });

  test('hourly means of the preceding hour end with the midnight of the next day', async () => {
    const hours = Array.from({ length: 24 }, (_, hour) =>
      point(
        hour === 23 ? '2001-01-02T00:00:00' : `2001-01-01T${String(hour + 1).padStart(2, '0')}:00:00`,
        String(hour),
      ),
    );
    const text = collection({ interpolation: 'AveragePrec', aggregation: 'PT1H', points: hours });
    expect(valuesOf((await read(text, { mapping: { dailyMean: 1 } })).days)).toEqual({ '2001-01-01': 11.5 });
  });

  test.each([
    [
      'that stand for a month',
      { spacing: { base: '2001-01-01', step: 'P1M' }, points: [point(null, '1'), point(null, '2')] },
    ],
    ['one a month', { points: ['01', '02', '03', '04', '05'].map((month) => point(`2001-${month}-01`, month)) }],
  ])('values %s are refused as not daily', async (_what, series) => {
    expect((await refusal(collection(series))).message).toMatch(/days each|one value a month/);
  });
});

describe('values and flags', () => {
  const category = (value: string, description: string) =>
    `<wml2:qualifier xlink:title="${description}"><swe:Category definition="x"><swe:value>${value}</swe:value></swe:Category></wml2:qualifier>`;

  test('default metadata holds for points that say nothing themselves', async () => {
    const { parts } = await read(
      collection({
        defaults: category('P', 'Provisional data subject to revision.'),
        points: [point('2001-01-01', '1'), point('2001-01-02', '2', category('A', 'Approved'))],
      }),
    );
    expect(daysOf(parts[0])).toEqual({ '2001-01-01': [1, 'P'], '2001-01-02': [2, 'A'] });
    expect(parts[0].codeList.map(({ bits }) => bits)).toEqual([FLAG.provisional, 0]);
  });

  test('qualities, titles and codes say flags; a number (an offset) is none', async () => {
    const quality = (word: string) =>
      `<wml2:quality xlink:href="http://www.opengis.net/def/waterml/2.0/quality/${word}"/>`;
    const offset =
      '<wml2:qualifier><swe:Quantity><swe:uom code="m"/><swe:value>3.0</swe:value></swe:Quantity></wml2:qualifier>';
    const { parts } = await read(
      collection({
        points: [
          point('2001-01-01', '1', quality('estimate')),
          point('2001-01-02', '2', quality('suspect')),
          point('2001-01-03', '3', quality('unchecked')),
          point('2001-01-04', '4', '<wml2:qualifier xlink:title="Ice affected"/>'),
          point('2001-01-05', '5', offset),
        ],
      }),
    );
    expect(parts[0].codeList.map(({ text, bits }) => [text, bits])).toEqual([
      ['estimate', FLAG.estimated],
      ['suspect', FLAG.suspect],
      ['unchecked', FLAG.provisional],
      ['Ice affected', FLAG.ice],
      ['', 0],
    ]);
    expect(Array.from(parts[0].values)).toEqual([1, 2, 3, 4, 5]);
  });

  test('nil values are missing; another reason than “missing” is kept', async () => {
    const reason = (title: string) => `<wml2:nilReason xlink:title="${title}"/>`;
    const { parts, report } = await read(
      collection({
        points: [
          point('2001-01-01', 'nil', reason('missing')),
          point('2001-01-02', 'nil', reason('Ice')),
          point('2001-01-03', '0'),
          point('2001-01-04', 'NaN'),
        ],
      }),
    );
    expect(Array.from(parts[0].values)).toEqual([Number.NaN, Number.NaN, 0, Number.NaN]);
    expect(parts[0].codeList).toEqual([
      { text: '', bits: 0 },
      { text: 'Ice', bits: FLAG.ice, valueText: 'Ice' },
      { text: 'NaN', bits: 0, valueText: 'NaN' },
    ]);
    expect(report.stations[0]).toMatchObject({ values: 1, missing: 3, zeros: 1 });
  });

  test('what is no number is rejected with its point, station, text and reason', async () => {
    const { report, rejected } = await read(
      collection({ points: [...daily(['1', '2']), point('2001-02-30', '3'), point('2001-02-01', 'high')] }),
    );
    expect(report).toMatchObject({ rows: 4, accepted: 2, rejectedTotal: 2 });
    expect(rejected).toEqual([
      { row: 3, text: '0306 2001-02-30 3', reason: '“2001-02-30” is not a day of the calendar' },
      { row: 4, text: '0306 2001-02-01 high', reason: '“high” is not a number' },
    ]);
  });

  test('two unlike values of one day refuse the document', async () => {
    const { message } = await refusal(collection({ points: [point('2001-01-01', '1'), point('2001-01-01', '2')] }));
    expect(message).toMatch(/station 0306 has two unlike values of flow for 2001-01-01/);
  });
});

describe('units and quantities', () => {
  test.each([
    ['code="m3/s"', 'm3/s'],
    ['code="cumecs"', 'm3/s'],
    ['xlink:title="ft3/s"', 'ft3/s'],
    ['code="[cft_i]/s"', 'ft3/s'],
    ['code="L/s"', 'L/s'],
    ['code="ML/d"', 'ML/d'],
    ['code="10*6.[gal_us]/d"', 'Mgal/d'],
    ['code="43560.[cft_i]/d"', 'acre-ft/d'],
    ['xlink:href="urn:ogc:def:uom:UCUM::m3/s"', 'm3/s'],
    ['xlink:href="http://www.opengis.net/def/uom/UCUM/0/m3%2Fs"', 'm3/s'],
  ])('uom %s is %s', async (uom, unit) => {
    const { parts, report } = await read(collection({ uom, points: daily(['1']) }));
    expect([parts[0].unit, report.unit]).toEqual([unit, unit]);
  });

  test('a unit that is not said is asked for, and taken when given', async () => {
    const text = collection({ uom: '', points: daily(['1']) });
    expect((await refusal(text)).problem).toMatchObject({ needs: 'unit' });
    const { mapping, problems, understood } = await inspect(text);
    expect([mapping?.unit, problems.map(({ problem }) => problem.needs), understood[0].value]).toEqual([
      null,
      ['unit'],
      1,
    ]);
    expect((await read(text, { unit: 'L/s' })).parts[0].unit).toBe('L/s');
  });

  test('stage beside flow is offered, and read when asked for', async () => {
    const text = collection(
      { points: daily(['1', '2']) },
      { property: 'Gage height', uom: 'code="m"', points: daily(['0.5', '0.6']) },
      { property: 'Water temperature', uom: 'code="Cel"', points: daily(['8', '9']) },
    );
    const { others } = await inspect(text);
    expect(others.map(({ label, quantity, unit, samples }) => [label, quantity, unit, samples])).toEqual([
      ['Gage height', 'stage', 'm', ['0.5', '0.6']],
      ['Water temperature', null, null, ['8', '9']],
    ]);
    const also = [{ quantity: 'stage' as const, unit: 'm' as const, value: null, where: others[0].where }];
    const { parts, report } = await read(text, { mapping: { also } });
    expect(parts.map(({ quantity, unit, values }) => [quantity, unit, ...values])).toEqual([
      [undefined, 'm3/s', 1, 2],
      ['stage', 'm', 0.5, 0.6],
    ]);
    expect(report.warnings).toContain('Not read: Water temperature.');
  });

  test.each([
    ['Water temperature', 'Cel'],
    ['Suspended sediment discharge', 't/d'],
    ['Groundwater level', 'm'],
  ])('a document of %s alone is refused by its name', async (property, code) => {
    const problem = await refusal(collection({ property, uom: `code="${code}"`, points: daily(['1']) }));
    expect(problem.message).toMatch(/holds no series of daily flow/);
    expect(problem.problem.value).toBe(property);
  });

  test('a series without a property is of the quantity that a person names, where its unit can be', async () => {
    const text = documentOf(
      `<wml2:MeasurementTimeseries><wml2:defaultPointMetadata><wml2:DefaultTVPMeasurementMetadata><wml2:uom code="m"/></wml2:DefaultTVPMeasurementMetadata></wml2:defaultPointMetadata>${daily(['2', '3']).join('')}</wml2:MeasurementTimeseries>`,
    );
    expect((await refusal(text)).problem.value).toBe('series in m');
    const { parts } = await read(text, { fileName: '0306.xml', mapping: { quantity: 'stage' } });
    expect(parts.map(({ code, quantity, unit }) => [code, quantity, unit])).toEqual([['0306', 'stage', 'm']]);
  });

  test('a unit that was given goes before the document’s own, with a warning', async () => {
    const { parts, report } = await read(collection({ points: daily(['1']) }), { unit: 'L/s' });
    expect([parts[0].unit, report.warnings]).toEqual([
      'L/s',
      ['“Discharge” says m3/s; its values were read as L/s, as given.'],
    ]);
  });

  test('largest values of each day are no means, and are only offered', async () => {
    const text = collection({ interpolation: 'MaxPrec', points: daily(['1']) });
    expect((await refusal(text)).problem.needs).toBe('quantity');
  });
});

describe('stations', () => {
  test('a document may hold several, with their facts', async () => {
    const urn = 'urn:ogc:def:crs:EPSG::4326';
    const { parts, report } = await read(
      collection(
        {
          station: 'B',
          name: 'Bridge',
          river: 'Ribble',
          position: { srs: urn, pos: '53.8 -2.4' },
          points: daily(['1']),
        },
        { station: 'A', points: daily(['2']) },
      ),
    );
    expect(parts.map(({ code, values }) => [code, ...values])).toEqual([
      ['B', 1],
      ['A', 2],
    ]);
    expect(report.facts).toEqual([{ code: 'B', name: 'Bridge', river: 'Ribble', latitude: 53.8, longitude: -2.4 }]);
  });

  test.each([
    ['urn:ogc:def:crs:EPSG::4326', '59.881 9.908', false],
    ['http://www.opengis.net/def/crs/EPSG/0/4326', '59.881 9.908', false],
    ['EPSG:4326', '9.908 59.881', true],
    ['urn:ogc:def:crs:OGC:1.3:CRS84', '9.908 59.881', false],
  ])('a position in %s is latitude and longitude whatever their order', async (srs, pos, warns) => {
    const { report } = await read(collection({ position: { srs, pos }, points: daily(['1']) }));
    expect(report.facts).toEqual([{ code: '0306', latitude: 59.881, longitude: 9.908 }]);
    expect(report.warnings.length).toBe(warns ? 1 : 0);
  });

  test('a latitude that cannot be one is turned round, with a warning', async () => {
    const position = { srs: 'urn:ogc:def:crs:EPSG::4326', pos: '147.5 -41.8' };
    const { report } = await read(collection({ position, points: daily(['1']) }));
    expect(report.facts).toEqual([{ code: '0306', latitude: -41.8, longitude: 147.5 }]);
    expect(report.warnings.join()).toMatch(/other way round/);
  });

  test('an observation may refer to a station described elsewhere in the document', async () => {
    const station = `<wml2:samplingFeatureMember><wml2:MonitoringPoint gml:id="mp1"><gml:identifier codeSpace="">G-17</gml:identifier><gml:name>Bridge</gml:name><sa:parameter><om:NamedValue><om:name xlink:title="Catchment area"/><om:value xsi:type="gml:MeasureType" uom="ha">250</om:value></om:NamedValue></sa:parameter></wml2:MonitoringPoint></wml2:samplingFeatureMember>`;
    const text = collection({ points: daily(['1']) })
      .replace(/<om:featureOfInterest>.*<\/om:featureOfInterest>/s, '<om:featureOfInterest xlink:href="#mp1"/>')
      .replace('<wml2:observationMember>', `${station}<wml2:observationMember>`);
    const { parts, report } = await read(text);
    expect(parts[0].code).toBe('G-17');
    expect(report.facts).toEqual([{ code: 'G-17', name: 'Bridge', areaKm2: 2.5 }]);
  });

  test('the registry is asked by code, then by name', async () => {
    const known = [{ code: 'G-17', name: 'Bridge' }];
    const text = collection({ station: 'unknown', name: 'Bridge', points: daily(['1']) });
    expect((await read(text, { knownStations: known })).parts[0].code).toBe('G-17');
    const stranger = collection({ station: 'unknown', points: daily(['1']) });
    expect((await refusal(stranger, { knownStations: known })).problem).toMatchObject({
      needs: 'station',
      value: 'unknown',
    });
  });
});

describe('documents without a series', () => {
  test.each([
    ['a station alone', '<wml2:MonitoringPoint gml:id="a"/>', /it holds no series/],
    [
      'categories',
      '<wml2:CategoricalTimeseries><wml2:point/></wml2:CategoricalTimeseries>',
      /categories, not of numbers/,
    ],
    ['a series without points', '<wml2:MeasurementTimeseries/>', /none of its 1 series has a value/],
  ])('%s: refused with the reason', async (_what, content, message) => {
    expect((await refusal(documentOf(content))).message).toMatch(message);
    const { mapping, problems } = await inspect(documentOf(content));
    expect([mapping, problems.length]).toEqual([null, 1]);
  });

  test('points within points and outside a series are none', async () => {
    const inner = point('2001-01-02', '2').replace(/<\/?wml2:point>/g, '');
    const nested = point('2001-01-01', '1').replace('</wml2:MeasurementTVP>', `${inner}</wml2:MeasurementTVP>`);
    const outside = documentOf(point('2001-01-01', '1'));
    expect((await read(collection({ points: [nested] }))).report.rows).toBe(1);
    expect((await refusal(outside)).message).toMatch(/it holds no series/);
  });
});
