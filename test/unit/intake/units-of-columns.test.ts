import { describe, expect, test } from 'vitest';
import { dates, expectSaysAll, read, refusal } from './reading.ts';

describe('units that a file says in several places, or not at all', () => {
  test('readFlows asks for the unit where the heading says one and the column of units another', async () => {
    const rows = (unit: string) => `date,flow_m3s,unit\n2001-01-01,1,${unit}\n2001-01-02,2,${unit}\n`;
    const error = await refusal(rows('ft3/s'));
    expectSaysAll(error);
    expect(error.problem).toMatchObject({ needs: 'unit', value: 'flow_m3s' });
    expect((await read(rows('ft3/s'), { unit: 'ft3/s' })).report.unit).toBe('ft3/s');
    expect((await read(rows('m³/s'))).report.unit).toBe('m3/s');
    expect((await read(rows(''))).report.unit).toBe('m3/s');
  });

  test('readFlows takes the unit from the heading of the column that a person chose, and asks for that of its quantity', async () => {
    const text = 'station,date,flow_m3s,taken_cfs,stage_m,level\nX,2001-01-01,1,2,3,4\nX,2001-01-02,2,3,4,5\n';
    const unitOf = async (mapping: object) => (await read(text, { mapping })).report.unit;
    expect(await unitOf({})).toBe('m3/s');
    expect(await unitOf({ value: { column: 'taken_cfs' } })).toBe('ft3/s');
    expect(await unitOf({ value: { column: 3 } })).toBe('ft3/s');
    expect(await unitOf({ quantity: 'stage', value: { column: 'stage_m' } })).toBe('m');
    const error = await refusal(text, { mapping: { quantity: 'stage', value: { column: 'level' } } });
    expect(error.problem).toMatchObject({ needs: 'unit', value: 'level' });
    expect(error.problem.remedy).toBe('Say it: m, cm, mm, ft');
  });
});

describe('files in two units', () => {
  const rows = (...lines: string[]) => `date,value,unit\n${lines.join('\n')}\n`;

  test('readFlows refuses a column of units that names two, both with their rows', async () => {
    const error = await refusal(rows('2001-01-01,1,m3/s', '2001-01-02,5,m3/s', '2001-01-03,1,ft3/s'));
    expectSaysAll(error);
    expect(error.problem).toMatchObject({ row: 4, value: 'ft3/s' });
    expect(error.problem.message).toBe('the flows are in two units: “m3/s” in row 2 and “ft3/s” in row 4');
    // The unit that a person says is no answer: half of the rows would still be read as another.
    expect((await refusal(rows('2001-01-01,1,m3/s', '2001-01-02,1,ft3/s'), { unit: 'm3/s' })).message).toMatch(
      /two units/,
    );
  });

  test('readFlows refuses a second unit far down the file', async () => {
    const many = dates('1990-01-01', 9000).map((date) => `${date},1,m3/s`);
    const error = await refusal(rows(...many, '2016-01-01,5,cfs'));
    expectSaysAll(error);
    expect(error.problem).toMatchObject({ row: 9002, value: 'cfs' });
    expect(error.problem.message).toContain('“m3/s” in row 2 and “cfs” in row 9002');
  });

  test('readFlows reads the rows of one unit by a mapping, and takes other spellings for the same', async () => {
    const text = rows('2001-01-01,1,m3/s', '2001-01-02,5,cfs', '2001-01-03,2,m3/s');
    const { report } = await read(text, { mapping: { where: { column: 'unit', equals: 'm3/s' } } });
    expect(report).toMatchObject({ unit: 'm3/s', rows: 2, accepted: 2 });
    const spelt = await read(rows('2001-01-01,1,m3/s', '2001-01-02,5,m³/s', '2001-01-03,2,cumecs'));
    expect(spelt.report).toMatchObject({ unit: 'm3/s', rows: 3, accepted: 3 });
    const unknown = await read(rows('2001-01-01,1,m3/s', '2001-01-02,5,m3/s', '2001-01-03,2,buckets'));
    expect(unknown.report).toMatchObject({ rows: 3, accepted: 2 });
    expect(unknown.report.rejected[0].reason).toBe('the unit “buckets” is not that of the other rows, “m3/s”');
  });

  test('readFlows refuses values that carry two units, and columns of stations in two', async () => {
    const error = await refusal('date,flow\n2001-01-01,12 cfs\n2001-01-02,0.3 m3/s\n');
    expectSaysAll(error);
    expect(error.problem.message).toBe('the flows are in two units: “12 cfs” in row 2 and “0.3 m3/s” in row 3');
    const wide = await refusal('date,A1 (m3/s),B2 (L/s)\n2001-01-01,1,2\n', { unit: 'm3/s' });
    expect(wide.problem.message).toBe('the columns are in unlike units: “A1 (m3/s)” and “B2 (L/s)”');
  });
});
