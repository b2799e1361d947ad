import type { Basis } from '../basis.ts';

/** Flows on a scale on which stations can be compared, or why there is none. */
export type NormalisedCurve =
  | { ok: true; flows: Float64Array; unit: 'L/s/km²' | '1' | 'm³/s' }
  | { ok: false; reason: string };

/** A curve's flows put on the scale that the basis names.
 *
 *  - area: specific discharge, L/s/km²; a station without a drainage area is left out, with the reason
 *  - mean, median: ratio to the station's own mean or median over the days used, dimensionless
 *  - none: m³/s as they are
 *  @param curve    flows with the mean and median of the days they rest on, all m³/s; left unchanged
 *  @param areaKm2  drainage area, null when nobody knows it or it means nothing (springs)
 *  @throws RangeError when `areaKm2` is a number but not above 0 */
export function normaliseCurve(
  curve: { flows: Float64Array; mean: number; median: number },
  { by, areaKm2 }: { by: Basis['normalise']; areaKm2: number | null },
): NormalisedCurve {
  if (areaKm2 !== null && !(areaKm2 > 0)) {
    throw new RangeError(`normaliseCurve: areaKm2 must be above 0 or null, got ${areaKm2}`);
  }
  if (by === 'none') return { ok: true, flows: curve.flows.slice(), unit: 'm³/s' };
  if (Number.isNaN(curve.mean)) return { ok: false, reason: 'no usable year in the period' };
  if (by === 'area') {
    if (areaKm2 === null) {
      return { ok: false, reason: 'no drainage area is known: compare as a ratio to the mean or the median flow' };
    }
    return { ok: true, flows: curve.flows.map((flow) => (flow * 1000) / areaKm2), unit: 'L/s/km²' };
  }
  const divisor = curve[by];
  if (!(divisor > 0)) {
    const others = by === 'median' ? 'by area or as a ratio to the mean flow' : 'by area';
    return { ok: false, reason: `the ${by} flow is ${Number(divisor.toPrecision(4))} m³/s: compare ${others}` };
  }
  return { ok: true, flows: curve.flows.map((flow) => flow / divisor), unit: '1' };
}
