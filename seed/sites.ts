import type { Drainage } from './drainage.ts';
import type { Point } from './hex-grid.ts';
import { randomStream } from './random.ts';

/** A place on a river where flow is gauged. */
export interface Site {
  cell: number;
  /** index of its river */
  river: number;
  /** index of the next site downstream; −1 when there is none */
  below: number;
  /** cells that drain through it, and those of them that drain through no site further up */
  cells: number;
  ownCells: number;
  /** middle of its own cells, and their mean height above the mouth, 0 to 1 */
  middle: Point;
  ownHeight: number;
  /** height of the place itself, 0 to 1 */
  height: number;
}

/** Catchment of the smallest site, in cells. */
const LEAST_CELLS = 14;

/** Spreads sites over the rivers: the first near the mouth, each further one where the others are farthest.
 *  @returns every site after the one below it; fewer than asked for when the rivers hold no more places */
export function chooseSites(seed: number, drainage: Drainage, riverOf: Int32Array, count: number): Site[] {
  const { grid, order, upstreamCells } = drainage;
  const random = randomStream(seed, 'sites');
  const candidates = Array.from(order.filter((cell) => riverOf[cell] >= 0 && upstreamCells[cell] >= LEAST_CELLS));
  const positions = candidates.map((cell) => grid.position(cell));
  // Rivers of some size are gauged before brooks, and some places are better for it than others.
  const merit = candidates.map((cell) => Math.sqrt(Math.log(upstreamCells[cell])) * random.between(0.5, 1));
  const farness = new Float64Array(candidates.length).fill(Number.POSITIVE_INFINITY);
  const chosen: number[] = [];
  let pick = Math.min(2, candidates.length - 1);
  while (chosen.length < Math.min(count, candidates.length)) {
    chosen.push(candidates[pick]);
    const [x, y] = positions[pick];
    farness[pick] = 0;
    let best = -1;
    for (let i = 0; i < candidates.length; i += 1) {
      const distance = Math.sqrt((positions[i][0] - x) ** 2 + (positions[i][1] - y) ** 2) * merit[i];
      if (distance < farness[i]) farness[i] = distance;
      if (isTwin(candidates[i], candidates[pick])) farness[i] = 0;
      if (best < 0 || farness[i] > farness[best]) best = i;
    }
    pick = best;
  }
  return describeSites(drainage, riverOf, chosen);

  /** Two places on one river with nearly the same catchment tell the same story. */
  function isTwin(a: number, b: number): boolean {
    const ratio = upstreamCells[a] / upstreamCells[b];
    return riverOf[a] === riverOf[b] && ratio > 0.75 && ratio < 1.33;
  }
}

function describeSites(
  { grid, order, downstream, upstreamCells, height }: Drainage,
  riverOf: Int32Array,
  chosen: number[],
) {
  const isSite = new Set(chosen);
  const siteOf = new Int32Array(grid.cells).fill(-1);
  const sites: Site[] = [];
  const sums: { x: number; y: number; height: number }[] = [];
  for (const cell of order) {
    const below = downstream[cell] < 0 ? -1 : siteOf[downstream[cell]];
    siteOf[cell] = below;
    if (isSite.has(cell)) {
      siteOf[cell] = sites.length;
      sums.push({ x: 0, y: 0, height: 0 });
      sites.push({
        cell,
        river: riverOf[cell],
        below,
        cells: upstreamCells[cell],
        ownCells: 0,
        middle: [0, 0],
        ownHeight: 0,
        height: height[cell],
      });
    }
    const own = siteOf[cell];
    if (own < 0) continue;
    const [x, y] = grid.position(cell);
    sites[own].ownCells += 1;
    sums[own].x += x;
    sums[own].y += y;
    sums[own].height += height[cell];
  }
  for (const [i, site] of sites.entries()) {
    site.middle = [sums[i].x / site.ownCells, sums[i].y / site.ownCells];
    site.ownHeight = sums[i].height / site.ownCells;
  }
  return sites;
}
