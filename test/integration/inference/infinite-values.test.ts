import { expect, test } from 'vitest';
import { INDICES } from '../../../lib/basis.ts';
import { dayNumber, isoDate } from '../../../lib/calendar/day.ts';
import { importOne, refusalOf, registeredRegion, storedDays } from '../jobs/registered-region.ts';
import { askRegion, soundText } from './sound-answer.ts';

const place = registeredRegion();

const HEADER = 'station,date,discharge_m3s\n';
const INFINITE = ['Infinity', '-Infinity', 'inf', '1e999', '-1e999'];

test.each(INFINITE)('a flow of %s is not taken in: its file, row and text are told', async (value) => {
  const text = `${HEADER}A1,2010-01-01,3.5\nA1,2010-01-02,${value}\nA1,2010-01-03,3.4\n`;
  const { taken, problems } = await importOne(place, 'infinite.csv', text);
  expect(problems).toEqual([]);
  expect(taken[0]).toMatchObject({
    file: 'infinite.csv',
    report: {
      accepted: 2,
      rejectedTotal: 1,
      rejected: [{ row: 3, text: `A1,2010-01-02,${value}`, reason: `“${value}” is not a flow` }],
    },
  });
  expect(await storedDays(place, 'A1')).toEqual({ '2010-01-01': 3.5, '2010-01-03': 3.4 });
});

test.each(INFINITE)('a file of nothing but %s is refused with its row and a remedy', async (value) => {
  const refused = await refusalOf(place, 'all.csv', `${HEADER}0102,2010-01-01,${value}\n0102,2010-01-02,${value}\n`);
  expect(refused.problem?.row).toBe(2);
});

test('finite flows whose sums, or squares, are infinite are answered, or unranked with the reason', async () => {
  const rows: string[] = [];
  for (const [code, flows] of [
    ['AB7', ['1e308', '1e308']],
    ['0102', ['1e200', '3e200']],
  ] as const) {
    for (let day = dayNumber(1990, 1, 1); day <= dayNumber(2019, 12, 31); day += 1)
      rows.push(`${code},${isoDate(day)},${flows[(day >> 9) & 1]}`);
  }
  await importOne(place, 'huge.csv', `${HEADER}${rows.join('\n')}\n`);
  for (const index of INDICES) {
    for (const route of ['ranking', 'certainty', 'regional', 'start-end', 'breaks'] as const) {
      const query = `?index=${index}${route === 'breaks' ? '&breaks=2005' : ''}`;
      const text = await soundText(await askRegion('upper-wethe', route, query), `${route}${query}`);
      if (route !== 'ranking') continue;
      const { stations } = JSON.parse(text) as { stations: Record<string, unknown>[] };
      expect(stations.find((row) => row.station_code === 'AB7')).toMatchObject({
        rank: null,
        unranked_reason: expect.stringContaining('no usable year'),
      });
      for (const row of stations) expect(row.rank !== null || row.unranked_reason !== null).toBe(true);
    }
  }
});
