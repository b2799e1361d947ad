import { parse } from 'csv-parse/sync';
import { expect, test } from 'vitest';
import { rankingCsv } from '../../../lib/export/ranking-csv.ts';
import { RANKED, UNRANKED } from './sample-row.ts';

/** What scripts rely on, spelt out here once more: a change in the code must fail this test. */
const HEADER =
  'rank,rank_low,rank_high,station_code,station_name,river,latitude,longitude,drainage_area_km2,influence,years_used,' +
  'first_year,last_year,mean_minimum_m3s,mean_minimum_l_s_km2,slope_m3s_per_decade,slope_ci_low,slope_ci_high,' +
  'slope_percent_per_decade,kendall_tau,z,p_value,p_adjusted,trend,trend_of,zero_flow_years,unranked_reason,note,' +
  'steadiness,detectable_percent_per_decade,steepest_k,probability_among_steepest,' +
  'index,index_unit,mean_index,index_slope_per_decade,index_slope_ci_low,index_slope_ci_high';

test('rankingCsv has the columns that other programs rely on, in their order', () => {
  expect(rankingCsv([])).toBe(`${HEADER}\r\n`);
});

test('rankingCsv writes a ranked station in full, with quotes doubled and ten significant digits', () => {
  expect(rankingCsv([RANKED]).split('\r\n')[1]).toBe(
    '1,,,007,"Alder, at the ""mill""",Wethe,50.25,-7.5,120,natural,30,1990,2019,0.3333333333,2.777777778,' +
      '-0.01234567891,-0.02,0.3,-3.703703674,-0.25,-1.96,0.05,0.09,falling,minima,0,,,' +
      ',,,,minimum,m3/s,0.3333333333,-0.01234567891,-0.02,0.3',
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

test('rankingCsv says how sure a place is where that was computed', () => {
  const sure = { ...RANKED, rankLow: 1, rankHigh: 7, steadiness: 0.75 };
  const row = { ...sure, detectablePercent: 6.25, steepestK: 3, amongSteepest: 0.482 };
  const [cells] = parse(rankingCsv([row]), { columns: true }) as Record<string, string>[];
  expect(cells).toMatchObject({
    rank_low: '1',
    rank_high: '7',
    steadiness: '0.75',
    detectable_percent_per_decade: '6.25',
    steepest_k: '3',
    probability_among_steepest: '0.482',
  });
});

test('rankingCsv keeps every row given, in the order given', () => {
  const rows = parse(rankingCsv([UNRANKED, RANKED, UNRANKED]), { columns: true }) as Record<string, string>[];
  expect(rows.map((row) => row.station_code)).toEqual(['B 2', '007', 'B 2']);
});

test('rankingCsv leaves the columns of m³/s empty for what is no flow, and gives its own unit and sign', () => {
  const days = {
    slopePerDecade: null,
    slopeLow: null,
    slopeHigh: null,
    percentPerDecade: null,
    specificPerDecade: null,
  };
  const row = { ...RANKED, ...days, index: 'zero-flow-days', trendOf: 'zero-flow-days', meanValue: 12 } as const;
  const figures = { valueSlope: 3.5, valueSlopeLow: 1, valueSlopeHigh: 6 };
  const [cells] = parse(rankingCsv([{ ...row, ...figures }]), { columns: true }) as Record<string, string>[];
  expect(cells).toMatchObject({
    slope_m3s_per_decade: '',
    slope_percent_per_decade: '',
    trend: 'falling',
    trend_of: 'zero-flow-days',
    index: 'zero-flow-days',
    index_unit: 'd',
    mean_index: '12',
    index_slope_per_decade: '3.5',
    index_slope_ci_low: '1',
    index_slope_ci_high: '6',
  });
  const units = (['q95', 'bfi', 'minimum-date', 'deficit'] as const).map((index) => {
    const [{ index_unit }] = parse(rankingCsv([{ ...RANKED, index }]), { columns: true }) as Record<string, string>[];
    return index_unit;
  });
  expect(units).toEqual(['m3/s', '1', 'd', 'm3']);
});
