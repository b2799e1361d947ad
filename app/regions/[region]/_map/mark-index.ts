import Flatbush from 'flatbush';

/** Where the marks lie on the plane, and what lies near a point: the hit test and the way the arrow keys go. */
export interface MarkIndex {
  /** the nearest mark within `reach`, or −1; of marks equally near, the one drawn on top */
  at: (x: number, y: number, reach: number) => number;
  /** marks inside a box */
  inside: (minX: number, minY: number, maxX: number, maxY: number) => number[];
}

/** @param xs, ys places in drawing order: later ones lie on top */
export function indexMarks(xs: Float64Array, ys: Float64Array): MarkIndex {
  if (xs.length === 0) return { at: () => -1, inside: () => [] };
  const tree = new Flatbush(xs.length);
  for (let i = 0; i < xs.length; i++) tree.add(xs[i], ys[i], xs[i], ys[i]);
  tree.finish();
  return {
    at: (x, y, reach) => {
      let best = -1;
      let bestDistance = reach * reach;
      for (const i of tree.search(x - reach, y - reach, x + reach, y + reach)) {
        const distance = (xs[i] - x) ** 2 + (ys[i] - y) ** 2;
        if (distance < bestDistance || (distance === bestDistance && i > best)) {
          best = i;
          bestDistance = distance;
        }
      }
      return best;
    },
    inside: (minX, minY, maxX, maxY) => tree.search(minX, minY, maxX, maxY),
  };
}

export type Direction = 'left' | 'right' | 'up' | 'down';

/** The mark an arrow key goes to: ahead, and rather straight ahead than near but aside. Sideways distance counts double;
 *  what lies more aside than ahead is not in that direction.
 *  @returns its index, or −1 when nothing lies that way */
export function nextInDirection(xs: Float64Array, ys: Float64Array, from: number, direction: Direction): number {
  let best = -1;
  let bestCost = Number.POSITIVE_INFINITY;
  for (let i = 0; i < xs.length; i++) {
    if (i === from) continue;
    const dx = xs[i] - xs[from];
    const dy = ys[i] - ys[from];
    const ahead = direction === 'left' ? -dx : direction === 'right' ? dx : direction === 'up' ? -dy : dy;
    const aside = Math.abs(direction === 'left' || direction === 'right' ? dy : dx);
    if (ahead <= 0 || aside > ahead) continue;
    const cost = ahead + 2 * aside;
    if (cost < bestCost) [best, bestCost] = [i, cost];
  }
  return best;
}
