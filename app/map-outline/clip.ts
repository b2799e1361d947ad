import type { Position } from 'geojson';

/** West, south, east, north in degrees. */
export type Box = [number, number, number, number];

/** A ring cut to a box (Sutherland & Hodgman 1974, one edge after another). Cut edges run along the box.
 *  @returns an empty ring when nothing of it lies inside */
export function clipRing(ring: Position[], box: Box): Position[] {
  let points = ring;
  for (const edge of [0, 1, 2, 3] as const) {
    if (points.length === 0) return [];
    points = cutAt(points, edge, box);
  }
  if (points.length < 3) return [];
  const [first, last] = [points[0], points[points.length - 1]];
  return first[0] === last[0] && first[1] === last[1] ? points : [...points, first];
}

function cutAt(points: Position[], edge: 0 | 1 | 2 | 3, box: Box): Position[] {
  const axis = edge % 2;
  const limit = box[edge];
  const inside = (point: Position) => (edge < 2 ? point[axis] >= limit : point[axis] <= limit);
  const out: Position[] = [];
  for (let i = 0; i < points.length; i++) {
    const here = points[i];
    const before = points[(i + points.length - 1) % points.length];
    if (inside(here) !== inside(before)) {
      const share = (limit - before[axis]) / (here[axis] - before[axis]);
      const other = before[1 - axis] + share * (here[1 - axis] - before[1 - axis]);
      out.push(axis === 0 ? [limit, other] : [other, limit]);
    }
    if (inside(here)) out.push(here);
  }
  return out;
}

/** The runs of a line whose segments touch the box; they may reach a segment past it. */
export function runsInside(line: Position[], [west, south, east, north]: Box): Position[][] {
  const runs: Position[][] = [];
  let run: Position[] = [];
  for (let i = 1; i < line.length; i++) {
    const [a, b] = [line[i - 1], line[i]];
    const apart =
      Math.max(a[0], b[0]) < west ||
      Math.min(a[0], b[0]) > east ||
      Math.max(a[1], b[1]) < south ||
      Math.min(a[1], b[1]) > north;
    if (apart) {
      if (run.length) runs.push(run);
      run = [];
    } else {
      if (run.length === 0) run.push(a);
      run.push(b);
    }
  }
  if (run.length) runs.push(run);
  return runs;
}
