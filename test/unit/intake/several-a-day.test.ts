import { describe, expect, test } from 'vitest';
import { inspectFile } from '../../../lib/intake/inspect-file.ts';
import { dates, daysOf, read, refusal, withFile } from './reading.ts';

/** Rows of one station: a date, a clock time and a value, at equal steps through some days. */
function readings(
  days: readonly string[],
  stepMinutes: number,
  value: (minute: number, day: number) => string | null,
): string[] {
  return days.flatMap((date, day) =>
    Array.from({ length: 1440 / stepMinutes }, (_, at) => at * stepMinutes).flatMap((minute) => {
      const text = value(minute, day);
      const clock = `${String(Math.floor(minute / 60)).padStart(2, '0')}:${String(minute % 60).padStart(2, '0')}`;
      return text === null ? [] : [`${date} ${clock},${text}`];
    }),
  );
}

const table = (rows: readonly string[], header = 'datetime,flow_m3s') => `${header}\n${rows.join('\n')}\n`;

describe('a file of several values a day', () => {
  const days = dates('2001-02-27', 3);
  const hourly = readings(days, 60, (minute, day) => String(day * 100 + minute / 60));

  test('readFlows refuses it, with the interval and the number of values', async () => {
    const { problem } = await refusal(table(hourly));
    expect(problem).toMatchObject({ needs: 'daily-mean', row: 3, value: '2001-02-27' });
    expect(problem.message).toBe('the file has several values a day, mostly every 1 hour (24 on most days)');
    expect(problem.remedy).toContain('{"dailyMean": 0.8}');
  });

  test('readFlows takes daily means on demand: of 0, 1, …, 23 it is 11.5', async () => {
    const { report, days: means } = await read(table(hourly), { mapping: { dailyMean: 0.8 } });
    expect(means).toEqual({ '2001-02-27': [11.5, ''], '2001-02-28': [111.5, ''], '2001-03-01': [211.5, ''] });
    expect(report).toMatchObject({ rows: 72, accepted: 72, stations: [{ values: 3, missing: 0 }] });
  });

  test.each([
    ['below the share', 19, 0.8, Number.NaN],
    ['at the share', 18, 0.75, 8.5],
    ['above the share', 20, 0.8, 9.5],
  ])('a day %s', async (_, hours, share, expected) => {
    // The mean of 0 … n − 1 is (n − 1) / 2.
    const rows = readings(days, 60, (minute, day) => (day === 1 && minute >= hours * 60 ? null : String(minute / 60)));
    const { days: means, report } = await read(table(rows), { mapping: { dailyMean: share } });
    expect(means['2001-02-28'][0]).toBe(expected);
    expect(means['2001-02-27'][0]).toBe(11.5);
    expect(report.warnings.some((text) => /1 days with too few readings/.test(text))).toBe(Number.isNaN(expected));
  });

  test('missing readings cover nothing; flags are joined, and their text kept where it is the same all day', async () => {
    const rows = readings(days, 360, (minute, day) => {
      if (day === 0) return minute === 0 ? '-999,e' : '4,e';
      return day === 1 ? `2,${minute === 0 ? 'e' : 'P'}` : '-999,';
    });
    const text = table(rows, 'datetime,flow_m3s,flag');
    const { parts } = await read(text, { mapping: { dailyMean: 0.75 } });
    expect(daysOf(parts[0])).toEqual({
      '2001-02-27': [4, 'e'],
      '2001-02-28': [2, 'estimated provisional'],
      '2001-03-01': [Number.NaN, '-999'],
    });
    expect([...parts[0].codes].map((code) => parts[0].codeList[code].bits)).toEqual([1, 3, 0]);
    const strict = await read(text, { mapping: { dailyMean: 0.76 } });
    expect(strict.days['2001-02-27'][0]).toBeNaN();
  });

  test('a station that went from hours to quarters of an hour is averaged by either, month by month', async () => {
    const months = ['2001-01-01', '2001-02-01'].map((first) => dates(first, 28));
    const rows = [...readings(months[0], 60, () => '1'), ...readings(months[1], 15, () => '2')];
    const { report } = await read(table(rows), { mapping: { dailyMean: 1 } });
    expect(report.stations[0]).toMatchObject({ values: 56, missing: 0, min: 1, max: 2 });
  });

  test('two readings of a day of quarters of an hour do not make a day', async () => {
    const rows = readings(dates('2001-01-01', 10), 15, (minute, day) => (day !== 4 || minute % 720 === 0 ? '3' : null));
    const { report, days: means } = await read(table(rows), { mapping: { dailyMean: 0.5 } });
    expect(report.stations[0]).toMatchObject({ values: 9, missing: 1 });
    expect(means['2001-01-05'][0]).toBeNaN();
  });

  test('the day is that of the clock by which a time was written, whatever its offset', async () => {
    const rows = ['T00:15:00+13:45', 'T12:00:00Z', 'T23:45:00-11:00'].map((time, at) => `2001-01-01${time},${at + 1}`);
    const { days: means } = await read(table(rows), { mapping: { dailyMean: 0 } });
    expect(means).toEqual({ '2001-01-01': [2, ''] });
  });

  test('a time in a column of its own is found, and stations that come by turns are kept apart', async () => {
    const rows = dates('2001-01-01', 2).flatMap((date) =>
      ['06:00', '18:00'].flatMap((time, at) =>
        ['A', 'B'].map((code) => `${code},${date},${time},${at + (code === 'A' ? 1 : 10)}`),
      ),
    );
    const text = table(rows, 'station,date,time,flow_m3s');
    expect((await refusal(text)).problem.message).toContain('mostly every 12 hours');
    const { parts } = await read(text, { mapping: { dailyMean: 1 } });
    expect(parts.map(({ code, values }) => [code, ...values])).toEqual([
      ['A', 1.5, 1.5],
      ['B', 10.5, 10.5],
    ]);
  });

  test('hours and minutes in columns of their own are one time', async () => {
    const rows = [0, 15, 30, 45].flatMap((minute) => [5, 6].map((hour) => `2001,3,9,${hour},${minute},4`));
    const text = table(rows.sort(), 'year,month,day,hour,minute,flow_m3s');
    expect((await refusal(text)).problem.message).toContain('mostly every 15 minutes');
    // Eight quarters of an hour are a twelfth of a day.
    expect((await read(text, { mapping: { dailyMean: 0.083 } })).days).toEqual({ '2001-03-09': [4, ''] });
    expect((await read(text, { mapping: { dailyMean: 0.084 } })).report.stations[0].values).toBe(0);
  });

  test('readFlows finds readings that begin far behind the first rows, by their times', async () => {
    const daily = dates('1900-01-01', 30_000).map((date) => `${date} 09:00,5`);
    const late = readings(dates('2001-01-01', 2), 60, (minute) => String(minute));
    const { problem } = await refusal(table([...daily, ...late]));
    expect(problem.needs).toBe('daily-mean');
    const twice = await refusal(table([...daily, '1980-01-01 09:00,7']));
    expect(twice.problem.message).toContain('two unlike values for');
  });

  test('a reading that stands twice counts once', async () => {
    const rows = ['2001-01-01 00:00,1', '2001-01-01 12:00,4', '2001-01-01 12:00,4'];
    const { days: means, report } = await read(table(rows), { mapping: { dailyMean: 1 } });
    expect(means['2001-01-01'][0]).toBe(2.5);
    expect(report.warnings).toContain('1 readings stand twice; they were counted once.');
  });

  test('equal rows of one day without times are repeated rows, and unlike ones are readings', async () => {
    const four = Array.from({ length: 4 }, () => '2001-01-01,5');
    const { days: once, report } = await read(table(four, 'date,flow_m3s'));
    expect(once).toEqual({ '2001-01-01': [5, ''] });
    expect(report).toMatchObject({ rows: 4, accepted: 4, stations: [{ values: 1, duplicates: 3 }] });
    const blank = await read(table(['2001-01-01,', ...four], 'date,flow_m3s'));
    expect(blank.days).toEqual({ '2001-01-01': [5, ''] });
    const { problem } = await refusal(table(['2001-01-01,', ...four.slice(1), '2001-01-01,6'], 'date,flow_m3s'));
    expect(problem).toMatchObject({ needs: 'daily-mean', row: 3 });
    // Times make readings of them, whatever their values.
    const timed = await refusal(table(readings(['2001-01-01'], 360, () => '5')));
    expect(timed.problem.needs).toBe('daily-mean');
  });

  test('daily values stay what they are when daily means are asked for', async () => {
    const rows = dates('2001-01-01', 40).map((date, at) => `${date},${at / 8}`);
    const asked = await read(table(rows), { mapping: { dailyMean: 1 } });
    expect(asked.days).toEqual((await read(table(rows))).days);
  });
});

describe('a file of less than a value a day', () => {
  const every = (days: number, count: number) => dates('2001-01-01', days * count).filter((_, at) => at % days === 0);
  test.each([
    ['a month', Array.from({ length: 6 }, (_, at) => `2001-0${at + 1}-15`), 'one value a month'],
    ['a week', every(7, 6), 'one value a week'],
    ['a year', [1990, 1991, 1992, 1993].map((year) => `${year}-10-01`), 'one value a year'],
    ['ten days', every(10, 12), 'one value every 10 days'],
  ])('readFlows refuses one value %s as not daily', async (_, days, words) => {
    const { problem } = await refusal(
      table(
        days.map((date) => `${date},1`),
        'date,flow_m3s',
      ),
    );
    expect(problem.message).toBe(`the file is not of daily flows: at station gauge it has ${words}`);
  });

  test('readFlows and inspectFile refuse dates that are months', async () => {
    const text = table(['2001-01,1', '2001-02,2', '2001-03,3'], 'date,flow_m3s');
    expect((await refusal(text)).problem).toMatchObject({
      row: 2,
      message: 'the file is not of daily flows: its dates are months',
    });
    const seen = await withFile(text, (path) => inspectFile(path, { fileName: 'gauge.csv' }));
    expect(seen.problems.map(({ problem }) => problem.message)).toEqual([
      'the file is not of daily flows: its dates are months',
    ]);
  });

  test.each([
    ['three rows', ['2001-01-01', '2001-02-01', '2001-03-01']],
    ['uneven days', ['2001-01-01', '2001-01-20', '2001-03-01', '2001-03-03', '2001-06-09']],
    ['eleven rows every other day', every(2, 11)],
    ['daily values behind a few monthly ones', ['2001-01-01', '2001-02-01', '2001-03-01', '2001-04-01', '2001-04-02']],
  ])('readFlows takes %s', async (_, days) => {
    const { report } = await read(
      table(
        days.map((date) => `${date},1`),
        'date,flow_m3s',
      ),
    );
    expect(report.accepted).toBe(days.length);
  });
});
