import { STANDARD_EXCEEDANCES } from '../../curves/exceedances.ts';
import { medianAnnualCurve } from '../../curves/median-annual-curve.ts';
import { stationCurve } from '../../curves/station-curve.ts';
import type { CurveOptions } from '../../curves/used-days.ts';
import { readSeries } from '../../store/records.ts';
import { type PackedMinima, unpackMinima } from '../pack-minima.ts';
import type { CurveKind } from '../types.ts';

/** Curves of many stations before normalisation: flows in m³/s at STANDARD_EXCEEDANCES, station after station. */
export interface PackedCurves {
  stationIds: Int32Array;
  flows: Float64Array;
  days: Int32Array;
  years: Int32Array;
  mean: Float64Array;
  median: Float64Array;
  /** of each record as read; null without one */
  hashes: (string | null)[];
}

/** Duration curves of the stations whose minima are given; one without a record has no days and NaN for all flows.
 *  @param task.period  [first, last] low-flow years, or null for all */
export function curves(task: {
  minima: PackedMinima;
  kind: CurveKind;
  options: CurveOptions;
  period: [number, number] | null;
}): PackedCurves {
  const { stationIds } = task.minima;
  const minima = unpackMinima(task.minima);
  const place = new Map(Array.from(stationIds, (id, i) => [id, i]));
  const curveOf = task.kind === 'period' ? stationCurve : medianAnnualCurve;
  const packed: PackedCurves = {
    stationIds,
    flows: new Float64Array(stationIds.length * STANDARD_EXCEEDANCES.length).fill(Number.NaN),
    days: new Int32Array(stationIds.length),
    years: new Int32Array(stationIds.length),
    mean: new Float64Array(stationIds.length).fill(Number.NaN),
    median: new Float64Array(stationIds.length).fill(Number.NaN),
    hashes: new Array<string | null>(stationIds.length).fill(null),
  };
  readSeries(stationIds, (id, series, hash) => {
    const at = place.get(id)!;
    const curve = curveOf(series, minima.get(id)!, task.options, task.period);
    packed.flows.set(curve.flows, at * STANDARD_EXCEEDANCES.length);
    packed.days[at] = curve.days;
    packed.years[at] = curve.years;
    packed.mean[at] = curve.mean;
    packed.median[at] = curve.median;
    packed.hashes[at] = hash;
  });
  return packed;
}
