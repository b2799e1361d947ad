/** A curve in pixels of the figure: x rises, y is null where the curve gives no flow. */
export interface PixelCurve {
  code: string;
  y: readonly (number | null)[];
}

/** The curve that passes nearest to a point, measured upright, or null when none does within `reach` pixels.
 *  Between two exceedances the curve is the straight line that is drawn there. On a tie the earlier curve wins. */
export function nearestCurve(
  curves: readonly PixelCurve[],
  xs: readonly number[],
  point: { x: number; y: number },
  reach: number,
): string | null {
  const right = xs.findIndex((x) => x >= point.x);
  if (right < 0 || (right === 0 && point.x < xs[0])) return null;
  const left = Math.max(0, right - 1);
  const share = right === left ? 0 : (point.x - xs[left]) / (xs[right] - xs[left]);
  let best: string | null = null;
  let least = reach;
  for (const { code, y } of curves) {
    const a = y[left];
    const b = y[right];
    if (a === null || b === null) continue;
    const distance = Math.abs(a + (b - a) * share - point.y);
    if (distance < least || (best === null && distance === least)) {
      best = code;
      least = distance;
    }
  }
  return best;
}
