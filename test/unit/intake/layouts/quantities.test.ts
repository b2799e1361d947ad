import { describe, expect, test } from 'vitest';
import { daysOf, inspect, read, refusal } from '../reading.ts';

describe('agency tables of several series', () => {
  const header = (series: string[]) => {
    const names = ['agency_cd', 'site_no', 'datetime', ...series.flatMap((name) => [name, `${name}_cd`])];
    return `${names.join('\t')}\n${names.map(() => '9s').join('\t')}\n`;
  };
  const series = ['11_00065_00003', '12_00060_00001', '13_00060_00003', '14_00045_00006', '15_00010_00003'];
  const described = [
    '#            TS   parameter     statistic     Description',
    '#            11       00065     00003     Gage height, feet (Mean)',
    '#            14       00045     00006     Precipitation, total, inches (Sum)',
  ].join('\n');
  const row = (site: string, day: number) =>
    `XY\t${site}\t2001-03-0${day}\t1.${day}\tA\t99\tA\t${day}.5\tP\t0.0${day}\te\t11\tA`;
  const text = `${described}\n${header(series)}${[1, 2, 3].map((day) => row('0306', day)).join('\n')}\n`;

  test('readFlows takes the daily mean discharge; inspectFile offers the others by what their codes say', async () => {
    const { report, days } = await read(text);
    expect(report).toMatchObject({ layout: 'agency-tab', unit: 'ft3/s', rows: 3, accepted: 3 });
    expect(days['2001-03-02']).toEqual([2.5, 'P']);
    const { others } = await inspect(text);
    expect(others.map(({ label, quantity, unit, value, flag }) => [label, quantity, unit, value, flag])).toEqual([
      ['Gage height, feet (Mean)', 'stage', 'ft', { column: 3 }, { column: 4 }],
      ['12_00060_00001', null, null, { column: 5 }, { column: 6 }],
      ['Precipitation, total, inches (Sum)', 'rainfall', 'in', { column: 9 }, { column: 10 }],
      ['15_00010_00003', null, null, { column: 11 }, { column: 12 }],
    ]);
    expect(others[0].samples).toEqual(['1.1', '1.2', '1.3']);
  });

  test('readFlows reads a further series by a mapping, each value with its own flag', async () => {
    const { parts } = await read(text, {
      mapping: {
        also: [
          { quantity: 'stage', unit: 'ft', value: { column: 3 }, flag: { column: 4 } },
          { quantity: 'rainfall', unit: 'in', value: { column: 9 }, flag: { column: 10 } },
        ],
      },
    });
    expect(parts.map(({ quantity = 'flow', unit, values }) => [quantity, unit, ...values])).toEqual([
      ['flow', 'ft3/s', 1.5, 2.5, 3.5],
      ['stage', 'ft', 1.1, 1.2, 1.3],
      ['rainfall', 'in', 0.01, 0.02, 0.03],
    ]);
    expect(daysOf(parts[2])['2001-03-01']).toEqual([0.01, 'e']);
  });

  test('readFlows follows a further series to where the next station’s header has it, and leaves out a station without', async () => {
    const later = `${header(['7_00060_00003', '8_00065_00003'])}XY\t0307\t2001-03-01\t70\tA\t8.5\tA\n`;
    const without = `${header(['9_00060_00003'])}XY\t0308\t2001-03-01\t80\tA\n`;
    const { parts } = await read(text + later + without, {
      mapping: { also: [{ quantity: 'stage', unit: 'ft', value: { column: 3 }, flag: { column: 4 } }] },
    });
    expect(parts.map(({ code, quantity = 'flow', values }) => [code, quantity, ...values])).toEqual([
      ['0306', 'flow', 1.5, 2.5, 3.5],
      ['0307', 'flow', 70],
      ['0308', 'flow', 80],
      ['0306', 'stage', 1.1, 1.2, 1.3],
      ['0307', 'stage', 8.5],
    ]);
  });

  test('readFlows refuses a later header without daily mean discharge, naming its row', async () => {
    const later = `${header(['8_00065_00003'])}XY\t0307\t2001-03-01\t8.5\tA\n`;
    const error = await refusal(text + later);
    expect(error.problem).toMatchObject({ row: 9, needs: 'mapping' });
  });
});

describe('quantities in columns of their own', () => {
  const text = 'date,flow_m3s,stage_cm,rain (mm),temp\n2001-01-01,1,50,0.5,3\n2001-01-02,2,60,0,4\n';

  test('inspectFile offers them with quantity and unit by their headings', async () => {
    const { others, mapping } = await inspect(text);
    expect(mapping?.value).toEqual({ column: 1 });
    expect(others.map(({ label, quantity, unit, value }) => [label, quantity, unit, value])).toEqual([
      ['stage_cm', 'stage', 'cm', { column: 2 }],
      ['rain (mm)', 'rainfall', 'mm', { column: 3 }],
      ['temp', null, null, { column: 4 }],
    ]);
  });

  test('readFlows reads one of them in place of the flow, in its own unit', async () => {
    const { report, parts } = await read(text, {
      mapping: { quantity: 'stage', unit: 'cm', value: { column: 'stage_cm' } },
    });
    expect(report).toMatchObject({ unit: 'cm', rows: 2, accepted: 2 });
    expect(parts.map(({ quantity, unit, values }) => [quantity, unit, ...values])).toEqual([['stage', 'cm', 50, 60]]);
  });
});

describe('quantities in rows of their own', () => {
  const titled = [
    'Daily Discharge (m3/s) (PARAM = 1) and Daily Water Level (m) (PARAM = 2)',
    ' ID,PARAM,Date,Value,SYM',
    ...['X1,1,1914/06/15,4.53,', 'X1,2,1914/06/15,1.01,A', 'X1,1,1914/06/16,3.96,B'],
  ].join('\n');

  test('inspectFile offers what a title line names', async () => {
    const { others } = await inspect(titled);
    expect(others).toEqual([
      {
        ...{ label: 'Daily Water Level (m)', samples: ['1.01'], quantity: 'stage', unit: 'm' },
        ...{ value: { column: 3 }, flag: { column: 4 }, where: { column: 1, equals: '2' } },
      },
    ]);
    const { parts } = await read(titled, {
      mapping: { also: [{ quantity: 'stage', unit: 'm', value: { column: 3 }, where: { column: 1, equals: '2' } }] },
    });
    expect(parts.map(({ quantity = 'flow', unit, values }) => [quantity, unit, ...values])).toEqual([
      ['flow', 'm3/s', 4.53, 3.96],
      ['stage', 'm', 1.01],
    ]);
  });

  const worded = (...names: string[]) =>
    `date,parameter,value\n${names.map((name, at) => `2001-01-01,${name},${at + 1}`).join('\n')}\n`;

  test('readFlows takes the rows that are called discharge, and asks where none or several are', async () => {
    const { report, days } = await read(worded('Wasserstand', 'Abfluss', 'Regen'), { unit: 'm3/s' });
    expect(report.mapping.where).toEqual({ column: 1, equals: 'Abfluss' });
    expect(days).toEqual({ '2001-01-01': [2, ''] });
    const error = await refusal(worded('A', 'B'), { unit: 'm3/s' });
    expect(error.problem).toMatchObject({ needs: 'quantity', value: 'parameter' });
    const both = await refusal(worded('discharge', 'discharge estimated'), { unit: 'm3/s' });
    expect(both.problem.needs).toBe('quantity');
  });
});

test('inspectFile offers the other numbers of a fixed-width file once the flow is known, of unknown kind', async () => {
  const lines = ['1948 1 1    0.0000    0.4600', '1948 1 2    0.0000    0.4550', '19481231    1.0000  -99.0000'];
  const { others } = await inspect(lines.join('\n'), { unit: 'mm/d', mapping: { value: { slice: [18, 28] } } });
  expect(others).toEqual([
    {
      ...{ label: 'characters 9–18', samples: ['0.0000', '0.0000', '1.0000'], quantity: null, unit: null },
      ...{ value: { slice: [8, 18] }, flag: null },
    },
  ]);
});
