import type { SureRow } from '../region/sure-rows.ts';
import { type Column, csvTable } from './csv.ts';
import { INDEX_COLUMNS } from './ranking-index-columns.ts';
import { SURENESS_COLUMNS } from './ranking-sureness-columns.ts';
import { STATION_CODE } from './shared-columns.ts';

const M3S = 'm³/s';
const SPECIFIC = 'L/s/km²';

/** The columns of the ranking file, in the order that other programs rely on: change them only by adding at the end. */
export const RANKING_COLUMNS: readonly Column<SureRow>[] = [
  {
    name: 'rank',
    datatype: 'integer',
    description:
      'place in the ranking, 1 = steepest decline; equal figures share the better place; empty when unranked',
    value: (row) => row.rank,
  },
  {
    name: 'rank_low',
    datatype: 'integer',
    description: 'lower end of the 90 % interval of the place; empty while not computed',
    value: (row) => row.rankLow,
  },
  {
    name: 'rank_high',
    datatype: 'integer',
    description: 'upper end of the 90 % interval of the place; empty while not computed',
    value: (row) => row.rankHigh,
  },
  STATION_CODE,
  { name: 'station_name', datatype: 'string', description: 'name of the gauging station', value: (row) => row.name },
  { name: 'river', datatype: 'string', description: 'river at the station', value: (row) => row.river },
  { name: 'latitude', datatype: 'number', unit: '°', description: 'latitude, WGS 84', value: (row) => row.latitude },
  { name: 'longitude', datatype: 'number', unit: '°', description: 'longitude, WGS 84', value: (row) => row.longitude },
  {
    name: 'drainage_area_km2',
    datatype: 'number',
    unit: 'km²',
    description: 'drainage area; empty when unknown or meaningless',
    value: (row) => row.areaKm2,
  },
  {
    name: 'influence',
    datatype: 'string',
    description: 'natural, regulated, abstracted, augmented, spring-fed, urban or unknown',
    value: (row) => row.influence,
  },
  {
    name: 'years_used',
    datatype: 'integer',
    description: 'usable years that were used',
    value: (row) => row.yearsUsed,
  },
  { name: 'first_year', datatype: 'integer', description: 'first usable year used', value: (row) => row.firstYear },
  { name: 'last_year', datatype: 'integer', description: 'last usable year used', value: (row) => row.lastYear },
  {
    name: 'mean_minimum_m3s',
    datatype: 'number',
    unit: M3S,
    description: 'mean of the annual n-day minima',
    value: (row) => row.meanMinimum,
  },
  {
    name: 'mean_minimum_l_s_km2',
    datatype: 'number',
    unit: SPECIFIC,
    description: 'mean of the annual n-day minima over the drainage area',
    value: (row) => row.meanMinimumSpecific,
  },
  {
    name: 'slope_m3s_per_decade',
    datatype: 'number',
    unit: `${M3S} per decade`,
    description:
      'slope of the annual minima, Q95 or mean flows, median of all pairs of years; empty where no flow is compared',
    value: (row) => row.slopePerDecade,
  },
  {
    name: 'slope_ci_low',
    datatype: 'number',
    unit: `${M3S} per decade`,
    description: 'lower end of the 95 % interval of the slope',
    value: (row) => row.slopeLow,
  },
  {
    name: 'slope_ci_high',
    datatype: 'number',
    unit: `${M3S} per decade`,
    description: 'upper end of the 95 % interval of the slope',
    value: (row) => row.slopeHigh,
  },
  {
    name: 'slope_percent_per_decade',
    datatype: 'number',
    unit: '% per decade',
    description: 'slope in percent of the mean of what is compared; empty for zero-flow days and for dates',
    value: (row) => row.percentPerDecade,
  },
  { name: 'kendall_tau', datatype: 'number', description: 'Kendall’s tau-b with the years', value: (row) => row.tau },
  {
    name: 'z',
    datatype: 'number',
    description: 'standard normal deviate of the Mann–Kendall test',
    value: (row) => row.z,
  },
  { name: 'p_value', datatype: 'number', description: 'two-sided p of the Mann–Kendall test', value: (row) => row.p },
  {
    name: 'p_adjusted',
    datatype: 'number',
    description:
      'p adjusted for the number of stations tested (Benjamini–Hochberg), over all ranked stations of the region',
    value: (row) => row.pAdjusted,
  },
  {
    name: 'trend',
    datatype: 'string',
    description: 'falling, rising or none: by p_adjusted against alpha; falling is drier, and earlier for dates',
    value: (row) => row.trend,
  },
  {
    name: 'trend_of',
    datatype: 'string',
    description:
      'what z, p, tau and trend speak of: minima, or the index compared (of minus the index for zero-flow-days and deficit, for more of them is drier); zero-days where zero flow is too frequent for a slope, of minus the days',
    value: (row) => row.trendOf,
  },
  {
    name: 'zero_flow_years',
    datatype: 'integer',
    description: 'usable years with an n-day minimum of 0',
    value: (row) => row.zeroFlowYears,
  },
  {
    name: 'unranked_reason',
    datatype: 'string',
    description: 'why the station has no place; empty when it has one',
    value: (row) => row.unrankedReason,
  },
  { name: 'note', datatype: 'string', description: 'what a reader of this row must know', value: (row) => row.note },
  ...SURENESS_COLUMNS,
  ...INDEX_COLUMNS,
];

/** The ranking as CSV, ranked rows first, in the order given; every row given is written. */
export function rankingCsv(rows: readonly SureRow[]): string {
  return csvTable(RANKING_COLUMNS, rows);
}
