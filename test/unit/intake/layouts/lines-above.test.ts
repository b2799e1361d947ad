import { describe, expect, test } from 'vitest';
import { inspectFile } from '../../../../lib/intake/inspect-file.ts';
import type { FoundFacts } from '../../../../lib/intake/types.ts';
import { dates, read, refusal, withFile } from '../reading.ts';

const latin1 = (text: string) => Buffer.from(text, 'latin1');

const inspect = (content: string | Uint8Array, options = {}) =>
  withFile(content, (path) => inspectFile(path, { fileName: 'a.txt', ...options }));

/** Facts as the report has them, without those of a code. */
const factsOf = async (content: string | Uint8Array, options = {}): Promise<FoundFacts[] | undefined> =>
  (await read(content, { unit: 'm3/s', ...options })).report.facts;

describe('files of one station under a block of lines about it', () => {
  test('readFlows reads a date column beside a column of times that hold “--:--”', async () => {
    const text = latin1(
      [
        '# Title:                 FILE OF DAILY DISCHARGES',
        '# file generation date:  2020-02-14',
        '#',
        '# XYZA-No.:              6335020',
        '# River:                 RHEIN',
        '# Station:               MÜHLHEIM',
        '# Country:               DE',
        '# Latitude (DD):         51.7568',
        '# Longitude (DD):        6.3953',
        '# Catchment area (km²):  159300.0',
        '# Altitude (m ASL):      8.7',
        '# Next downstream station:   6435060',
        '# Unit of measure:       m³/s',
        '#************************************************************',
        '# Data lines: 3',
        '#',
        '# DATA',
        'YYYY-MM-DD;hh:mm; Value',
        '1930-01-01;--:--;   1230.000',
        '1930-01-02;--:--;   -999.000',
        '1930-01-03;--:--;   1180.500',
      ].join('\r\n'),
    );
    const { report, days, parts } = await read(text);
    expect(report).toMatchObject({ layout: 'long', unit: 'm3/s', rows: 3, accepted: 3, rejected: [] });
    expect(report.mapping.station).toEqual({ from: 'lines-above' });
    expect(parts[0].code).toBe('6335020');
    expect(days).toEqual({
      '1930-01-01': [1230, ''],
      '1930-01-02': [Number.NaN, '-999.000'],
      '1930-01-03': [1180.5, ''],
    });
    expect(report.facts).toEqual([
      {
        ...{ code: '6335020', name: 'MÜHLHEIM', river: 'RHEIN' },
        ...{ latitude: 51.7568, longitude: 6.3953, areaKm2: 159300 },
      },
    ]);
  });

  test('readFlows reads a heading block that ends in “Werte:”, decimal commas and the word for a gap, in Latin-1', async () => {
    const text = latin1(
      [
        'Messstelle:;Wörth',
        'ABC-Nummer:;201012',
        'ABC-Messstellenummer:;201012',
        'Gewässer:;Große Ach',
        'orogr.Einzugsgebiet [km²]:;1202,7',
        'Exportzeitreihe:;Tagesmittel',
        'Einheit:;m³/s',
        'Geographische Länge:;13° 45\' 30" E',
        "Geographische Breite:;47° 15' N",
        'Werte:',
        '01.01.1976 00:00:00;   12,3',
        '02.01.1976 00:00:00;Lücke',
        '13.01.1976 00:00:00;   0,125',
      ].join('\r\n'),
    );
    const { report, days, parts } = await read(text);
    expect(report).toMatchObject({ layout: 'long', unit: 'm3/s', rows: 3, accepted: 3, rejected: [] });
    expect(report.mapping).toMatchObject({ decimal: ',', date: { order: 'dmy' } });
    expect(parts[0].code).toBe('201012');
    expect(days).toEqual({
      '1976-01-01': [12.3, ''],
      '1976-01-02': [Number.NaN, 'Lücke'],
      '1976-01-13': [0.125, ''],
    });
    expect(report.facts).toEqual([
      {
        ...{ code: '201012', name: 'Wörth', river: 'Große Ach', areaKm2: 1202.7 },
        ...{ latitude: 47.25, longitude: 13.758333 },
      },
    ]);
  });

  test('readFlows reads “#” lines of key and value, the last of which is the header', async () => {
    const text = [
      '#station_no;15012',
      '#station_name;Ballyduff',
      '#station_latitude;52.1473',
      '#station_longitude;-8.0521',
      '#river_name;Blackwater',
      '#ts_unitsymbol;m³/s',
      '#Timestamp;Value;Quality Code',
      '1999-12-31T00:00:00.000Z;31.5;31',
      '2000-01-01T00:00:00.000Z;;255',
      '2000-01-02T00:00:00.000Z;33.25;31',
    ].join('\n');
    const { report, days, parts } = await read(text);
    expect(report).toMatchObject({ layout: 'long', unit: 'm3/s', rows: 3, accepted: 3, rejected: [] });
    expect(parts[0].code).toBe('15012');
    expect(days).toEqual({
      '1999-12-31': [31.5, '31'],
      '2000-01-01': [Number.NaN, '255'],
      '2000-01-02': [33.25, '31'],
    });
    expect(report.facts).toEqual([
      { code: '15012', name: 'Ballyduff', river: 'Blackwater', latitude: 52.1473, longitude: -8.0521 },
    ]);
    expect((await inspect(text)).header).toEqual(['Timestamp', 'Value', 'Quality Code']);
  });

  test('readFlows reads a station block and a parameter block before the header', async () => {
    const text = [
      'Stationsnamn;Stationsnummer;Vattendrag;Avrinningsområde (km²);Latitud;Longitud',
      'ÖVRE FORSEN;2357;Lilla älven;3345.5;68.20;19.99',
      '',
      'Parameternamn;Beskrivning;Enhet',
      'Vattenföring (Dygn);medelvärde 1 dygn;m³/s',
      '',
      'Tidsperiod (fr.o.m);Tidsperiod (t.o.m)',
      '1985-01-01;2020-12-31',
      '',
      'Datum (svensk sommartid);Vattenföring (Dygn);Kvalitet',
      '1985-01-01;12.1;G',
      '1985-01-02;12.3;Y',
      '1985-01-03;;',
      '1985-01-04;11.9;G',
    ].join('\n');
    const { report, days, parts } = await read(text);
    expect(report).toMatchObject({ layout: 'long', unit: 'm3/s', rows: 4, accepted: 4, rejected: [] });
    expect(parts[0].code).toBe('2357');
    expect(days['1985-01-02']).toEqual([12.3, 'Y']);
    expect(days['1985-01-03']).toEqual([Number.NaN, '']);
    expect(report.facts).toEqual([
      {
        ...{ code: '2357', name: 'ÖVRE FORSEN', river: 'Lilla älven' },
        ...{ latitude: 68.2, longitude: 19.99, areaKm2: 3345.5 },
      },
    ]);
  });

  test('readFlows reads 26 comment lines over a table whose megalitres are those of a day', async () => {
    const block = Array.from({ length: 26 }, (_, at) =>
      at === 5 ? '#Station number: 410730' : at === 6 ? '#Catchment Area (km2): 130' : `#Note ${at}, flow volumes`,
    );
    const rows = dates('2010-06-01', 4).map((date, at) => `${date},${at}.5,${at === 2 ? 'E' : 'A'}`);
    const { report, days, parts } = await read([...block, 'Date,Flow (ML),XY QCode', ...rows].join('\n'));
    expect(report).toMatchObject({ layout: 'long', unit: 'ML/d', rows: 4, accepted: 4, rejected: [] });
    expect(parts[0].code).toBe('410730');
    expect(days['2010-06-03']).toEqual([2.5, 'E']);
    expect(report.facts).toEqual([{ code: '410730', areaKm2: 130 }]);
  });
});

describe('comment signs', () => {
  test.each(['#', '//', '%', ';', '*', '!', '"# '])(
    'readFlows skips lines that begin with %s, and reads their facts',
    async (sign) => {
      const end = sign.startsWith('"') ? '"' : '';
      const text = [
        `${sign} Station number: 77${end}`,
        `${sign} made 2001-02-03, of use to nobody${end}`,
        `${sign} Units: cfs${end}`,
        'date,flow',
        '2001-01-01,1',
        '2001-01-02,2',
      ].join('\n');
      const { report, parts } = await read(text);
      expect(report).toMatchObject({ unit: 'ft3/s', rows: 2, accepted: 2, rejected: [] });
      expect(parts[0].code).toBe('77');
    },
  );

  test.each(['#', '//', '%', '*'])('readFlows skips such lines between rows too: %s', async (sign) => {
    const text = `${sign} a\n${sign} b\ndate,flow_m3s\n2001-01-01,1\n${sign} c\n2001-01-02,2\n`;
    expect((await read(text)).report).toMatchObject({ rows: 2, accepted: 2, rejected: [] });
  });

  test('readFlows takes an empty first field for no comment', async () => {
    const text = ';date;flow_m3s\n;2001-01-01;1\n;2001-01-02;2\n';
    expect((await read(text)).report).toMatchObject({ rows: 2, accepted: 2 });
  });
});

describe('facts in several languages', () => {
  const rows = 'date;flow\n2001-01-01;1\n2001-01-02;2\n';
  test.each([
    ['German', 'Messstellennummer: 12\nMessstelle: Au\nFluss: Ach\nEinzugsgebiet: 12,5 km²'],
    ['French', 'Code station: 12\nNom: Au\nCours d’eau: Ach\nSuperficie du bassin versant (km²): 12,5'],
    ['Spanish', 'Código de la estación: 12\nNombre: Au\nRío: Ach\nÁrea de drenaje (km2): 12.5'],
    ['Portuguese', 'Código da estação: 12\nNome: Au\nRio: Ach\nÁrea de drenagem (km2): 12.5'],
    ['Swedish', 'Stationsnummer: 12\nStationsnamn: Au\nVattendrag: Ach\nAvrinningsområde: 12.5 km2'],
    ['Dutch', 'Stationsnummer: 12\nNaam: Au\nRivier: Ach\nStroomgebied (km2): 12,5'],
    ['English, acres', 'Site no = 12\nSite name = Au\nStream = Ach\nDrainage area = 3088.8172 acres'],
    ['English, square miles', 'Gauge ID;12\nGauge name;Au\nRiver name;Ach\nBasin area (sq mi);4.8262770'],
  ])('readFlows reads number, name, river and area: %s', async (_, block) => {
    const facts = await factsOf(`${block}\n${rows}`);
    expect(facts).toHaveLength(1);
    const [{ areaKm2, ...named }] = facts as FoundFacts[];
    expect(named).toEqual({ code: '12', name: 'Au', river: 'Ach' });
    // 12.5 km² in acres and square miles (NIST SP 811, 2008), to the digits written.
    expect(areaKm2).toBeCloseTo(12.5, 5);
  });

  test.each([
    ['German', 'Einheit: m³/s', 'm3/s'],
    ['English', 'Units: cfs', 'ft3/s'],
    ['French', 'Unité: l/s', 'L/s'],
    ['Spanish', 'Unidad: m3/s', 'm3/s'],
    ['Portuguese', 'Unidade: m³/s', 'm3/s'],
    ['Swedish', 'Enhet: m³/s', 'm3/s'],
    ['Dutch', 'Eenheid: m³/s', 'm3/s'],
    ['before what another line names', 'Unit: L/s\nMean flow: 3.2 m3/s', 'L/s'],
  ])('readFlows reads the unit: %s', async (_, line, unit) => {
    expect((await read(`${line}\n${rows}`)).report.unit).toBe(unit);
  });

  test('readFlows asks for the unit where heading and line disagree, or the line names another quantity’s', async () => {
    const disagree = await refusal('Units: cfs\ndate,flow_m3s\n2001-01-01,1\n');
    expect(disagree.problem.needs).toBe('unit');
    const level = await refusal('Unit: cm\nLong-term flow: 3 m3/s\ndate,value\n2001-01-01,1\n');
    expect(level.problem.needs).toBe('unit');
  });

  test('readFlows reads a block over rows at fixed characters', async () => {
    const lines = dates('1948-01-01', 12).map((date, at) => {
      const [year, month, day] = date.split('-').map(Number);
      return `${year}${String(month).padStart(2)}${String(day).padStart(2)}${'0.5'.padStart(9)}${String(at).padStart(9)}`;
    });
    const text = ['Station number: 12', 'Daily values, made in 1950', 'Units: mm/d', ...lines].join('\n');
    const { report, days, parts } = await read(text, { mapping: { value: { slice: [17, 26] } } });
    expect(report).toMatchObject({ layout: 'fixed-width', unit: 'mm/d', rows: 12, accepted: 12, rejected: [] });
    expect(parts[0].code).toBe('12');
    expect(days['1948-01-12']).toEqual([11, '']);
  });

  test('readFlows leaves out what is not plain: an area without its unit, or one that may have thousands; a place of one number', async () => {
    const bare = await factsOf(`Station no: 12\nName: Au\nCatchment area: 12.5\nLatitude: 51.2\n${rows}`);
    expect(bare).toEqual([{ code: '12', name: 'Au' }]);
    const thousands = await factsOf(`Station no: 12\nName: Au\nArea (km²): 1.202\nRiver: n/a\n${rows}`);
    expect(thousands).toEqual([{ code: '12', name: 'Au' }]);
    const projected = await factsOf(`Station no: 12\nName: Au\nLatitude: 5412345\nLongitude: 412345\n${rows}`);
    expect(projected).toEqual([{ code: '12', name: 'Au' }]);
    const other = await factsOf(`Country code: DE\nNext station: 99\nName: Au\n${rows}`, { fileName: 'k1.csv' });
    expect(other).toEqual([{ code: 'k1', name: 'Au' }]);
  });
});

describe('the station that a block names', () => {
  const text = 'Station number: 12\nStation: Au\ndate,flow_m3s\n2001-01-01,1\n2001-01-02,2\n';

  test('goes before the file’s name, and behind what is given or stands in a column', async () => {
    expect((await read(text, { fileName: '34.csv' })).parts[0].code).toBe('12');
    expect((await read(text, { fileName: '34.csv', station: '56' })).parts[0].code).toBe('56');
    const column = text.replace('date,', 'station,date,').replaceAll('2001-', '78,2001-');
    expect((await read(column)).parts[0].code).toBe('78');
  });

  test('must be the registry’s; a name alone counts where the registry has it', async () => {
    const known = [{ code: '99', name: 'Au' }];
    expect((await refusal(text, { knownStations: known })).problem).toMatchObject({ value: '12', needs: 'station' });
    const named = await read(text.replace('Station number: 12\n', ''), { knownStations: known });
    expect(named.parts[0].code).toBe('99');
    expect(named.report.mapping.station).toEqual({ from: 'lines-above' });
  });

  test('must be the only one: a later head of another station refuses the file, wherever it stands', async () => {
    const many = dates('1990-01-01', 9000).map((date) => `${date};1`);
    const block = (code: string, rows: string[]) => [`# Station number: ${code}`, '# Office-No.: 7', ...rows];
    const later = block('13', ['2016-01-01;2', '2016-01-02;3']);
    const error = await refusal([...block('12', ['date;flow_m3s', ...many]), ...later].join('\n'));
    expect(error.problem).toMatchObject({ row: 9004, value: '13', needs: 'station' });
    const bare = await refusal(
      [...block('12', ['date;flow_m3s', ...many]), 'Station number: 14', '2016-01-01;2'].join('\n'),
    );
    expect(bare.problem).toMatchObject({ row: 9004, value: '14', needs: 'station' });
    const same = await read([...block('12', ['date;flow_m3s', ...many]), ...block('12', ['2016-01-01;2'])].join('\n'));
    expect(same.report).toMatchObject({ rows: 9001, accepted: 9001 });
    expect(same.parts[0].code).toBe('12');
  });

  test('stands above the data: a comment behind them is no header, and names no station', async () => {
    const { report, parts } = await read('#date;flow_m3s\n2001-01-01;1\n2001-01-02;2\n# Station number: 99\n');
    expect(report).toMatchObject({ rows: 2, accepted: 2 });
    expect(parts[0].code).toBe('gauge');
  });

  test('is asked for where a mapping promises it and the lines do not name it', async () => {
    const error = await refusal('date,flow_m3s\n2001-01-01,1\n', { mapping: { station: { from: 'lines-above' } } });
    expect(error.problem).toMatchObject({ needs: 'station' });
  });
});
