export interface Point {
  x: number;
  y: number;
}

/** Room that a point and its outline take beside its middle, pixels. */
const POINT = 6;

/** Leftmost place in [left, right] at which a label of this size covers no point; at `left` where there is none.
 *  @param label  middle of its height, and its size, pixels
 *  @returns      its left edge */
export function freePlace(
  label: { y: number; width: number; height: number },
  points: readonly Point[],
  [left, right]: readonly [number, number],
): number {
  const near = points.filter(({ y }) => Math.abs(y - label.y) < label.height / 2 + POINT);
  const covers = (start: number) => near.some(({ x }) => x > start - POINT && x < start + label.width + POINT);
  const starts = [left, ...near.map(({ x }) => x + POINT).sort((a, b) => a - b)];
  return starts.find((start) => start >= left && start + label.width <= right && !covers(start)) ?? left;
}
