import { quantileType6 } from '../statistics/quantile.ts';

/** Where the middle 80 % of a region's stations lie at each exceedance. */
export interface RegionBand {
  p10: Float64Array;
  p50: Float64Array;
  p90: Float64Array;
}

/** 10th, 50th and 90th percentile over stations at each exceedance (type 6).
 *  @param curves  flows of each station at the same exceedances and in one unit; NaN is skipped, point by point
 *  @returns       as long as the curves; NaN where too few stations have a flow: fewer than 9 for p10 and p90
 *  @throws RangeError when the curves differ in length */
export function regionBand(curves: readonly Float64Array[]): RegionBand {
  const length = curves[0]?.length ?? 0;
  const unlike = curves.find((curve) => curve.length !== length);
  if (unlike) {
    throw new RangeError(`regionBand: curves must be of one length, got ${length} and ${unlike.length}`);
  }
  const band = { p10: new Float64Array(length), p50: new Float64Array(length), p90: new Float64Array(length) };
  for (let i = 0; i < length; i += 1) {
    const flows = Float64Array.from(curves, (curve) => curve[i])
      .filter((flow) => !Number.isNaN(flow))
      .sort();
    band.p10[i] = quantileType6(flows, 0.1);
    band.p50[i] = quantileType6(flows, 0.5);
    band.p90[i] = quantileType6(flows, 0.9);
  }
  return band;
}
