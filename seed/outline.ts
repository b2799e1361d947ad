import type { HexGrid, Point } from './hex-grid.ts';

/** The outer boundary of a set of cells as a closed ring, counter-clockwise, first point not repeated.
 *  @param inside  true for the cells of the set
 *  @param cells   the cells of the set */
export function outlineOf(grid: HexGrid, cells: Iterable<number>, inside: (cell: number) => boolean): Point[] {
  // Sides that face outwards, by the corner they begin at. Three cells meet at a corner, so only one side of the
  // boundary begins there.
  const next = new Map<number, number>();
  for (const cell of cells) {
    for (let k = 0; k < 6; k += 1) {
      const beyond = grid.neighbour(cell, k);
      if (beyond < 0 || !inside(beyond)) next.set(grid.corner(cell, k), grid.corner(cell, k + 1));
    }
  }
  let longest: number[] = [];
  while (next.size > 0) {
    const ring: number[] = [];
    const [start] = next.keys();
    for (let corner: number | undefined = start; corner !== undefined && next.has(corner); ) {
      ring.push(corner);
      const following = next.get(corner);
      next.delete(corner);
      corner = following;
    }
    if (ring.length > longest.length) longest = ring;
  }
  return soften(longest.map((corner) => grid.cornerPoint(corner)));
}

/** Takes the zigzag of the cells out of a ring and leaves its bends: every point moves between its neighbours, twice,
 *  then every other point is dropped. */
function soften(ring: Point[]): Point[] {
  let points = ring;
  for (let pass = 0; pass < 2; pass += 1) {
    const before = points;
    points = before.map(([x, y], i) => {
      const [x0, y0] = before[(i + before.length - 1) % before.length];
      const [x1, y1] = before[(i + 1) % before.length];
      return [(x0 + 2 * x + x1) / 4, (y0 + 2 * y + y1) / 4];
    });
  }
  return points.length < 12 ? points : points.filter((_, i) => i % 2 === 0);
}
