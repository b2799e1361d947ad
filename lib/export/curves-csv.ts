import { type Column, csvTable } from './csv.ts';
import { STATION_CODE } from './shared-columns.ts';

/** One station's duration curve as it is written: flows at exceedances, in one unit. */
export interface CurveToWrite {
  code: string;
  unit: string;
  /** exceedance probabilities, 0 to 1, rising */
  exceedances: ArrayLike<number>;
  /** same length; NaN where the curve has no value */
  flows: ArrayLike<number>;
}

export interface CurveRow {
  code: string;
  exceedance: number;
  flow: number;
  unit: string;
}

export const CURVE_COLUMNS: readonly Column<CurveRow>[] = [
  STATION_CODE,
  {
    name: 'exceedance',
    datatype: 'number',
    description: 'share of time, 0 to 1, in which the flow is exceeded',
    value: (row) => row.exceedance,
  },
  {
    name: 'flow',
    datatype: 'number',
    description: 'flow at this exceedance; empty outside the plotting positions of the record',
    value: (row) => row.flow,
  },
  { name: 'unit', datatype: 'string', description: 'unit of the flow; 1 for ratios', value: (row) => row.unit },
];

function* curveRows(curves: readonly CurveToWrite[]): Generator<CurveRow> {
  for (const { code, unit, exceedances, flows } of curves) {
    for (let i = 0; i < exceedances.length; i++) {
      yield { code, exceedance: exceedances[i], flow: flows[i], unit };
    }
  }
}

/** Duration curves as CSV in long form: one row a station and exceedance. */
export function curvesCsv(curves: readonly CurveToWrite[]): string {
  return csvTable(CURVE_COLUMNS, curveRows(curves));
}
