import { INDEX_FACTS } from '../region/index-facts.ts';
import type { RankingRow } from '../region/ranking-types.ts';
import type { Column } from './csv.ts';

/** Units as UCUM writes them, so that other programs know them. */
const UNITS: Record<string, string> = { 'm³/s': 'm3/s', days: 'd', 'day of the year': 'd', 'm³': 'm3', '': '1' };

/** What was compared, in its own unit: the same figures as the columns of minima where minima are compared. */
export const INDEX_COLUMNS: readonly Column<RankingRow>[] = [
  {
    name: 'index',
    datatype: 'string',
    description:
      'the annual figure that is compared: minimum, q95, mean-flow, zero-flow-days, bfi, minimum-date or deficit; zero-flow-days too where zero flow is too frequent for a slope',
    value: (row) => row.index,
  },
  {
    name: 'index_unit',
    datatype: 'string',
    description:
      'unit of mean_index: m3/s, d, m3, or 1 for a number without unit; dates are days of the calendar year, 1 = 1 January, below 1 in the year before and above 365 in the year after',
    value: (row) => UNITS[INDEX_FACTS[row.index].unit],
  },
  {
    name: 'mean_index',
    datatype: 'number',
    description: 'mean of the annual figures',
    value: (row) => row.meanValue,
  },
  {
    name: 'index_slope_per_decade',
    datatype: 'number',
    description:
      'slope of the annual figures, median of all pairs of years, with their own sign: where more is drier (zero-flow-days, deficit) a falling trend has a slope above 0; days for dates',
    value: (row) => row.valueSlope,
  },
  {
    name: 'index_slope_ci_low',
    datatype: 'number',
    description: 'lower end of the 95 % interval of the slope',
    value: (row) => row.valueSlopeLow,
  },
  {
    name: 'index_slope_ci_high',
    datatype: 'number',
    description: 'upper end of the 95 % interval of the slope',
    value: (row) => row.valueSlopeHigh,
  },
];
