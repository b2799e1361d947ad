import { HexGrid } from './hex-grid.ts';
import { fractalNoise } from './noise.ts';
import { randomStream } from './random.ts';

/** Where the water of every cell goes. */
export interface Drainage {
  grid: HexGrid;
  /** cell that the water runs to; −1 at the mouth, −2 outside the basin */
  downstream: Int32Array;
  /** cells of the basin from the mouth upwards: every cell comes after the one it drains to */
  order: Int32Array;
  /** cells that drain through a cell, itself included */
  upstreamCells: Int32Array;
  /** 0 at the mouth to 1 at the farthest divide: the share of the basin that is nearer to the mouth */
  height: Float64Array;
  mouth: number;
}

/** Lays a river basin of about `basinCells` cells.
 *
 *  The outline is a circle bent by noise. From a mouth in the south-west, channels grow inland cheapest way first over
 *  ground of fractal resistance: cheap ground gathers channels into valleys, dear ground becomes divides. Every cell
 *  drains the way it was reached, so catchments are nested by construction. */
export function layDrainage(seed: number, basinCells: number): Drainage {
  const columns = Math.ceil(Math.sqrt(basinCells / 0.47));
  const grid = new HexGrid(seed, columns, Math.ceil(columns * 1.05));
  const resistance = layGround(seed, grid);
  const mouth = findMouth(grid, resistance);
  const { downstream, order } = growChannels(grid, resistance, mouth);

  const upstreamCells = new Int32Array(grid.cells);
  for (let i = order.length - 1; i >= 0; i -= 1) {
    const cell = order[i];
    upstreamCells[cell] += 1;
    if (downstream[cell] >= 0) upstreamCells[downstream[cell]] += upstreamCells[cell];
  }
  const height = new Float64Array(grid.cells);
  for (const [rank, cell] of order.entries()) height[cell] = rank / order.length;
  return { grid, downstream, order, upstreamCells, height, mouth };
}

/** Resistance of each cell to being drained; infinite outside the basin's outline. */
function layGround(seed: number, grid: HexGrid): Float64Array {
  const [width, height] = grid.position(grid.cells - 1);
  const outline = fractalNoise(seed, 'outline', { scale: width / 4, octaves: 5 });
  const hills = fractalNoise(seed, 'hills', { scale: width / 9, octaves: 5 });
  const random = randomStream(seed, 'ground');
  return Float64Array.from({ length: grid.cells }, (_, cell) => {
    const [x, y] = grid.position(cell);
    const fromMiddle = Math.hypot(x / width - 0.5, y / height - 0.5) / 0.41;
    const roughness = Math.exp(4.2 * hills(x, y)) * random.between(0.4, 1.6);
    return fromMiddle + 0.38 * outline(x, y) < 1 ? roughness : Number.POSITIVE_INFINITY;
  });
}

/** The cell of the basin nearest to the south-west corner. */
function findMouth(grid: HexGrid, resistance: Float64Array): number {
  let mouth = -1;
  let nearest = Number.POSITIVE_INFINITY;
  for (let cell = 0; cell < grid.cells; cell += 1) {
    const [x, y] = grid.position(cell);
    if (resistance[cell] === Number.POSITIVE_INFINITY || x + 0.7 * y >= nearest) continue;
    nearest = x + 0.7 * y;
    mouth = cell;
  }
  return mouth;
}

/** Cheapest ways from the mouth to every cell (Dijkstra 1959). */
function growChannels(grid: HexGrid, resistance: Float64Array, mouth: number) {
  const downstream = new Int32Array(grid.cells).fill(-2);
  const cost = new Float64Array(grid.cells).fill(Number.POSITIVE_INFINITY);
  const done = new Uint8Array(grid.cells);
  const order: number[] = [];
  const queue = new CheapestFirst();
  cost[mouth] = 0;
  downstream[mouth] = -1;
  queue.push(mouth, 0);
  for (let cell = queue.pop(); cell >= 0; cell = queue.pop()) {
    // A cell that was reached ever more cheaply stands in the queue several times.
    if (done[cell] === 1) continue;
    done[cell] = 1;
    order.push(cell);
    for (let k = 0; k < 6; k += 1) {
      const next = grid.neighbour(cell, k);
      if (next < 0 || cost[cell] + resistance[next] >= cost[next]) continue;
      cost[next] = cost[cell] + resistance[next];
      downstream[next] = cell;
      queue.push(next, cost[next]);
    }
  }
  return { downstream, order: Int32Array.from(order) };
}

/** A binary heap of cells, the cheapest on top. */
class CheapestFirst {
  readonly #cells: number[] = [];
  readonly #costs: number[] = [];

  push(cell: number, cost: number): void {
    let at = this.#cells.length;
    while (at > 0) {
      const parent = (at - 1) >> 1;
      if (this.#costs[parent] <= cost) break;
      this.#cells[at] = this.#cells[parent];
      this.#costs[at] = this.#costs[parent];
      at = parent;
    }
    this.#cells[at] = cell;
    this.#costs[at] = cost;
  }

  /** Takes the cheapest cell out; −1 when there is none. */
  pop(): number {
    const top = this.#cells[0];
    const cell = this.#cells.pop();
    const cost = this.#costs.pop();
    if (cell === undefined || cost === undefined) return -1;
    const length = this.#cells.length;
    if (length === 0) return top;
    let at = 0;
    for (let child = 1; child < length; child = 2 * at + 1) {
      if (child + 1 < length && this.#costs[child + 1] < this.#costs[child]) child += 1;
      if (this.#costs[child] >= cost) break;
      this.#cells[at] = this.#cells[child];
      this.#costs[at] = this.#costs[child];
      at = child;
    }
    this.#cells[at] = cell;
    this.#costs[at] = cost;
    return top;
  }
}
