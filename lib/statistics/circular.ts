/** Mean direction of angles, and how far they agree in it. */
export interface CircularMean {
  /** radians, 0 to below 2π; NaN without angles, and where they cancel out */
  angle: number;
  /** length of the mean vector: 0 where they cancel out, 1 where all are equal; NaN without angles */
  concentration: number;
}

/** Shorter mean vectors are rounding: opposite angles do not cancel out to exactly 0. */
const CANCELLED = 1e-12;
const TURN = 2 * Math.PI;

/** Mean direction of angles on the circle, so that the last and the first day of a year lie side by side.
 *  @param angles  radians, any turn
 *  @throws RangeError for an angle that is no finite number
 *  Source: Mardia & Jupp 2000, Directional Statistics, Wiley, section 2.2.
 *  Example: [0.1, 2π − 0.1] → angle 0, concentration cos 0.1 */
export function circularMean(angles: ArrayLike<number>): CircularMean {
  let cosines = 0;
  let sines = 0;
  for (let i = 0; i < angles.length; i++) {
    if (!Number.isFinite(angles[i]))
      throw new RangeError(`circularMean: angles[${i}] must be finite, got ${angles[i]}`);
    cosines += Math.cos(angles[i]);
    sines += Math.sin(angles[i]);
  }
  const concentration = Math.hypot(cosines, sines) / angles.length;
  if (!(concentration > CANCELLED)) return { angle: Number.NaN, concentration };
  const angle = Math.atan2(sines, cosines);
  return { angle: angle < 0 ? angle + TURN : angle, concentration };
}

/** The angle as a place on a line, at most half a turn from `about`: what a slope can be laid through.
 *  @returns a value in [about − π, about + π)
 *  Example: unrolled(0.1, 2π − 0.1) → 2π + 0.1 */
export function unrolled(angle: number, about: number): number {
  const turns = Math.floor((angle - about + Math.PI) / TURN);
  return angle - turns * TURN;
}
