import { randomStream } from './random.ts';

/** A point in km east and north of the grid's south-west corner. */
export type Point = readonly [x: number, y: number];

/** Width of a cell, side to opposite side, and the area that follows from it. */
export const CELL_KM = 1.25;
export const CELL_KM2 = (Math.sqrt(3) / 2) * CELL_KM ** 2;

/** The six neighbours of a hexagon, counter-clockwise from the east, as [rows, columns] for even and odd rows. */
const NEIGHBOURS = [
  [
    [0, 1],
    [1, 0],
    [1, -1],
    [0, -1],
    [-1, -1],
    [-1, 0],
  ],
  [
    [0, 1],
    [1, 1],
    [1, 0],
    [0, -1],
    [-1, 0],
    [-1, 1],
  ],
] as const;

/** The corner at which the side towards neighbour k begins, in half widths and in 1/(2√3) widths from the centre. */
const CORNERS = [
  [1, -1],
  [1, 1],
  [0, 2],
  [-1, 1],
  [-1, -1],
  [0, -2],
] as const;

/** Hexagonal cells in rows: water can leave a cell by six sides, and two ways never cross. Centres and corners are
 *  moved a little at random, the same for all who use them, so that no line drawn along them looks ruled. */
export class HexGrid {
  readonly cells: number;
  readonly #centreShifts: Float64Array;
  readonly #cornerShifts: Float64Array;

  constructor(
    seed: number,
    readonly columns: number,
    readonly rows: number,
  ) {
    this.cells = columns * rows;
    const centres = randomStream(seed, 'centres');
    this.#centreShifts = Float64Array.from({ length: 2 * this.cells }, () => centres.between(-0.22, 0.22));
    const corners = randomStream(seed, 'corners');
    this.#cornerShifts = Float64Array.from({ length: 8192 }, () => corners.between(-0.16, 0.16));
  }

  /** Centre of a cell before it is moved. */
  position(cell: number): Point {
    const row = Math.floor(cell / this.columns);
    const column = cell - row * this.columns;
    return [CELL_KM * (column + (row & 1) / 2), CELL_KM * row * (Math.sqrt(3) / 2)];
  }

  /** Where rivers pass through a cell. */
  centre(cell: number): Point {
    const [x, y] = this.position(cell);
    return [x + CELL_KM * this.#centreShifts[2 * cell], y + CELL_KM * this.#centreShifts[2 * cell + 1]];
  }

  /** The cell beyond side k, or −1 beyond the grid's edge. */
  neighbour(cell: number, k: number): number {
    const row = Math.floor(cell / this.columns);
    const column = cell - row * this.columns;
    const [dRow, dColumn] = NEIGHBOURS[row & 1][k];
    const [r, c] = [row + dRow, column + dColumn];
    return r < 0 || r >= this.rows || c < 0 || c >= this.columns ? -1 : r * this.columns + c;
  }

  /** Name of the corner at which side k of a cell begins; its three cells give it the same name. */
  corner(cell: number, k: number): number {
    const row = Math.floor(cell / this.columns);
    const column = cell - row * this.columns;
    const [dx, dy] = CORNERS[k % 6];
    return (3 * row + dy + 2) * (2 * this.columns + 4) + (2 * column + (row & 1) + dx + 1);
  }

  /** Where a corner lies. */
  cornerPoint(corner: number): Point {
    const width = 2 * this.columns + 4;
    const y = Math.floor(corner / width);
    const x = corner - y * width;
    const shift = Math.imul(corner, 2654435761) >>> 20;
    return [
      CELL_KM * ((x - 1) / 2 + this.#cornerShifts[2 * shift]),
      CELL_KM * ((y - 2) / (2 * Math.sqrt(3)) + this.#cornerShifts[2 * shift + 1]),
    ];
  }
}
