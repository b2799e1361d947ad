import { type DurationCurve, flowAtExceedance } from './duration-curve.ts';

/** Slope of the middle of a duration curve: (ln Q33 − ln Q66)/(0.66 − 0.33). Steep where flow comes and goes, flat
 *  where springs or lakes hold it up.
 *  @returns dimensionless, at least 0; NaN where Q66 is 0 or the curve does not reach */
export function middleSlope(curve: DurationCurve): number {
  const q33 = flowAtExceedance(curve, 0.33);
  const q66 = flowAtExceedance(curve, 0.66);
  return q66 > 0 ? (Math.log(q33) - Math.log(q66)) / (0.66 - 0.33) : Number.NaN;
}
