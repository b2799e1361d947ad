import { describe, expect, test } from 'vitest';
import { dayNumber } from '../../../lib/calendar/day.ts';
import { daysOf, read, refusal } from './reading.ts';

test('readFlows reads thousands as a mapping says, also behind “<”, and rejects what is not grouped by three', async () => {
  const text =
    'date;flow_m3s\n2001-01-01;1.234,5\n2001-01-02;<2.000\n2001-01-03;12,5\n2001-01-04;1.23,4\n2001-01-05;-1.234\n';
  const { days, rejected } = await read(text, { mapping: { decimal: ',', thousands: '.' } });
  expect(days).toEqual({
    '2001-01-01': [1234.5, ''],
    '2001-01-02': [2000, '<'],
    '2001-01-03': [12.5, ''],
    '2001-01-05': [-1234, ''],
  });
  expect(rejected.map(({ row }) => row)).toEqual([5]);
});

test('readFlows takes negative flows as written, with a warning', async () => {
  const { days, report } = await read('date,flow_m3s\n2001-01-01,-12.5\n2001-01-02,3\n2001-01-03,-0.25\n');
  expect(Object.values(days).map(([value]) => value)).toEqual([-12.5, 3, -0.25]);
  expect(report.warnings).toEqual([expect.stringMatching(/^2 values are negative.*as written/)]);
});

describe('future dates', () => {
  const text = 'date,flow_m3s\n2001-01-01,1\n2001-01-03,2\n2001-01-02,3\n2001-01-04,\n';
  test.each([
    [dayNumber(2001, 1, 1), /^2 values lie in the future, the first in row 3 \(2001-01-03\); they were kept/],
    [dayNumber(2001, 1, 2), /^1 value lies in the future, the first in row 3/],
  ])('readFlows counts values behind day %d and keeps them', async (today, warning) => {
    const { report, days } = await read(text, { today });
    expect(report.warnings).toEqual([expect.stringMatching(warning)]);
    expect(Object.keys(days)).toHaveLength(4);
  });

  test('readFlows says nothing of today, of days without a value, and of the past by the clock', async () => {
    expect((await read(text, { today: dayNumber(2001, 1, 3) })).report.warnings).toEqual([]);
    expect((await read(text)).report.warnings).toEqual([]);
    expect((await read('date,flow_m3s\n2150-01-01,1\n2150-01-02,1\n')).report.warnings).toEqual([
      expect.stringMatching(/^2 values lie in the future/),
    ]);
  });
});

describe('further quantities of one file', () => {
  const text =
    'station,date,flow_cfs,stage,flag\nA,2001-01-01,5,1.25,e\nA,2001-01-02,6,-0.5,\nB,2001-01-01,7,high,A\nB,2001-01-02,x,2,A\n';

  test('readFlows reads each that the mapping asks for, with flags and units of its own', async () => {
    const also = [{ quantity: 'stage' as const, unit: 'ft' as const, value: { column: 'stage' }, flag: null }];
    const { report, parts } = await read(text, { mapping: { value: { column: 2 }, also } });
    expect(parts.map(({ code, quantity, unit }) => [code, quantity, unit])).toEqual([
      ['A', undefined, 'ft3/s'],
      ['B', undefined, 'ft3/s'],
      ['A', 'stage', 'ft'],
      ['B', 'stage', 'ft'],
    ]);
    expect(daysOf(parts[0])).toEqual({ '2001-01-01': [5, 'e'], '2001-01-02': [6, ''] });
    expect(daysOf(parts[2])).toEqual({ '2001-01-01': [1.25, ''], '2001-01-02': [-0.5, ''] });
    expect(report).toMatchObject({ rows: 4, accepted: 3, rejectedTotal: 1, unit: 'ft3/s' });
    expect(report.stations.map(({ code, quantity, values }) => [code, quantity, values])).toEqual([
      ['A', undefined, 2],
      ['B', undefined, 1],
      ['A', 'stage', 2],
      ['B', 'stage', 1],
    ]);
    // The level below the gauge's zero is nothing to warn of; the one that cannot be read is.
    expect(report.warnings).toEqual([
      expect.stringMatching(/^Of stage: 1 rows cannot be read, the first of them row 4: /),
    ]);
  });

  test('readFlows reads quantities that a column tells apart', async () => {
    const rows =
      'station,date,param,value\nA,2001-01-01,Q,5\nA,2001-01-01,W,120\nA,2001-01-02,Q,6\nA,2001-01-02,W,121\n';
    const { parts } = await read(rows, {
      mapping: {
        ...{ unit: 'L/s', where: { column: 'param', equals: 'Q' } },
        also: [{ quantity: 'stage', unit: 'cm', value: { column: 'value' }, where: { column: 'param', equals: 'W' } }],
      },
    });
    expect(parts.map(({ quantity = 'flow', values }) => [quantity, ...values])).toEqual([
      ['flow', 5, 6],
      ['stage', 120, 121],
    ]);
  });

  test('readFlows takes a file of another quantity alone', async () => {
    const { report, parts } = await read('station,date,rain\nA,2001-01-01,5\nA,2001-01-02,0\n', {
      mapping: { quantity: 'rainfall', unit: 'mm', value: { column: 'rain' } },
    });
    expect(parts[0]).toMatchObject({ quantity: 'rainfall', unit: 'mm' });
    expect(report.stations[0]).toMatchObject({ quantity: 'rainfall', zeros: 1, max: 5 });
  });

  test('readFlows refuses a unit that is none of the quantity’s', async () => {
    const { problem } = await refusal('date,flow\n2001-01-01,5\n', { unit: 'mm' });
    expect(problem).toMatchObject({ value: 'mm', needs: 'unit', message: 'this is no unit of flow' });
    const { parts } = await read('date,rain\n2001-01-01,5\n', {
      ...{ unit: 'mm', mapping: { quantity: 'rainfall', value: { column: 1 } } },
    });
    expect(parts[0]).toMatchObject({ quantity: 'rainfall', unit: 'mm' });
  });

  test('readFlows refuses the file when a further quantity contradicts itself', async () => {
    const twice = `${text}A,2001-01-01,5,9,e\n`;
    const also = [{ quantity: 'stage' as const, unit: 'ft' as const, value: { column: 'stage' } }];
    const { problem } = await refusal(twice, { mapping: { value: { column: 2 }, also } });
    expect(problem.message).toMatch(/two unlike values for 2001-01-01: 1.25 in row 2 and 9 in row 6/);
  });
});
