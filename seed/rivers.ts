import type { Drainage } from './drainage.ts';
import type { Point } from './hex-grid.ts';

/** One river, from its head to the river or sea that takes it in. */
export interface River {
  /** cells from the head down; the last is the first cell of the river that takes it in, or the mouth */
  cells: number[];
  /** index of the river that takes it in; −1 for the one that reaches the sea */
  into: number;
}

/** Divides the channels into rivers: at each confluence the branch with the larger catchment keeps the name.
 *  @param leastCells  catchment at which a channel counts as a river
 *  @returns rivers, each after the one that takes it in; and for every cell its river, −1 where there is none */
export function traceRivers(
  { grid, order, downstream, upstreamCells }: Drainage,
  leastCells: number,
): { rivers: River[]; riverOf: Int32Array } {
  const mainBranch = new Int32Array(grid.cells).fill(-1);
  for (const cell of order) {
    const below = downstream[cell];
    if (below < 0 || upstreamCells[cell] < leastCells) continue;
    const rival = mainBranch[below];
    if (rival < 0 || upstreamCells[cell] > upstreamCells[rival]) mainBranch[below] = cell;
  }
  const riverOf = new Int32Array(grid.cells).fill(-1);
  const rivers: River[] = [];
  for (const cell of order) {
    if (upstreamCells[cell] < leastCells) continue;
    const below = downstream[cell];
    if (below >= 0 && mainBranch[below] === cell) {
      riverOf[cell] = riverOf[below];
      rivers[riverOf[cell]].cells.push(cell);
    } else {
      riverOf[cell] = rivers.length;
      rivers.push(below < 0 ? { cells: [cell], into: -1 } : { cells: [below, cell], into: riverOf[below] });
    }
  }
  for (const river of rivers) river.cells.reverse();
  return { rivers, riverOf };
}

/** Where each river cell lies on its river: centres drawn towards their neighbours up and down the river, so that the
 *  course bends without the zigzag of the cells. Stations and confluences stand on these points. */
export function riverPoints({ grid }: Drainage, rivers: readonly River[]): Map<number, Point> {
  const points = new Map<number, Point>();
  for (const { cells, into } of rivers) {
    let course = cells.map((cell) => grid.centre(cell));
    for (let pass = 0; pass < 2; pass += 1) {
      const before = course;
      course = before.map((point, i) => {
        if (i === 0 || i === before.length - 1) return point;
        const [[x0, y0], [x, y], [x1, y1]] = [before[i - 1], point, before[i + 1]];
        return [(x0 + 2 * x + x1) / 4, (y0 + 2 * y + y1) / 4];
      });
    }
    // The last point of a tributary belongs to the river that takes it in.
    const own = into < 0 ? cells.length : cells.length - 1;
    for (let i = 0; i < own; i += 1) points.set(cells[i], course[i]);
  }
  return points;
}

const STEPS = 3;

/** A smooth line that passes through every point: Catmull–Rom pieces of three steps. */
export function smoothLine(points: readonly Point[]): Point[] {
  const last = points.length - 1;
  const line: Point[] = [];
  for (let i = 0; i < last; i += 1) {
    const [p0, p1, p2, p3] = [points[Math.max(0, i - 1)], points[i], points[i + 1], points[Math.min(last, i + 2)]];
    const on = (axis: 0 | 1, t: number) => {
      const [a, b, c, d] = [p0[axis], p1[axis], p2[axis], p3[axis]];
      return b + 0.5 * t * (c - a + t * (2 * a - 5 * b + 4 * c - d + t * (3 * (b - c) + d - a)));
    };
    for (let step = 0; step < STEPS; step += 1) line.push([on(0, step / STEPS), on(1, step / STEPS)]);
  }
  line.push(points[last]);
  return line;
}
