import { parse } from 'csv-parse/sync';
import { expect, test } from 'vitest';
import { rankingCsv } from '../../../lib/export/ranking-csv.ts';
import { RANKED, UNRANKED } from './sample-row.ts';

/** What scripts rely on, spelt out here once more: a change in the code must fail this test. */
const HEADER =
  'rank,rank_low,rank_high,station_code,station_name,river,latitude,longitude,drainage_area_km2,influence,years_used,' +
  'first_year,last_year,mean_minimum_m3s,mean_minimum_l_s_km2,slope_m3s_per_decade,slope_ci_low,slope_ci_high,' +
  'slope_percent_per_decade,kendall_tau,z,p_value,p_adjusted,trend,trend_of,zero_flow_years,unranked_reason,note';

test('rankingCsv has the columns that other programs rely on, in their order', () => {
  expect(rankingCsv([])).toBe(`${HEADER}\r\n`);
});

test('rankingCsv writes a ranked station in full, with quotes doubled and ten significant digits', () => {
  expect(rankingCsv([RANKED]).split('\r\n')[1]).toBe(
    '1,,,007,"Alder, at the ""mill""",Wethe,50.25,-7.5,120,natural,30,1990,2019,0.3333333333,2.777777778,' +
      '-0.01234567891,-0.02,0.3,-3.703703674,-0.25,-1.96,0.05,0.09,falling,minima,0,,',
  );
});

test('rankingCsv leaves the rank and the figures of an unranked station empty and gives the reason', () => {
  const [row] = parse(rankingCsv([UNRANKED]), { columns: true }) as Record<string, string>[];
  expect(row).toMatchObject({
    rank: '',
    station_code: 'B 2',
    latitude: '',
    drainage_area_km2: '',
    years_used: '3',
    slope_m3s_per_decade: '',
    p_adjusted: '',
    trend: '',
    unranked_reason: '3 usable years, 20 needed',
    note: 'short',
  });
});

test('rankingCsv keeps every row given, in the order given', () => {
  const rows = parse(rankingCsv([UNRANKED, RANKED, UNRANKED]), { columns: true }) as Record<string, string>[];
  expect(rows.map((row) => row.station_code)).toEqual(['B 2', '007', 'B 2']);
});
