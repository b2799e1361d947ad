import type { RiverLine } from './river-lines.ts';

/** A river layer as points joined by stretches, and where each point's water goes. */
export interface RiverGraph {
  /** longitude and latitude of each point */
  lon: Float64Array;
  lat: Float64Array;
  /** ends of each stretch, in the order of its line */
  from: Int32Array;
  to: Int32Array;
  /** index of each stretch's line in the layer */
  line: Int32Array;
  /** connected part that each point belongs to */
  part: Int32Array;
  parts: number;
  /** stretches at each point: those of point i are `touching[start[i]]` to `touching[start[i + 1] - 1]` */
  start: Int32Array;
  touching: Int32Array;
}

/** Ends of lines that come this near to another line flow into it: layers are not always drawn point on point. */
const JOIN_KM = 0.1;
/** Points count as one when they agree to about a metre. */
const STEPS_PER_DEGREE = 1e5;

/** Joins the lines of a layer where they share a point, and where a line ends beside another. */
export function riverGraph(lines: readonly RiverLine[]): RiverGraph {
  const [lon, lat]: number[][] = [[], []];
  const stretches: [from: number, to: number, line: number][] = [];
  const pointAt = new Map<string, number>();
  const point = ([x, y]: readonly [number, number]): number => {
    const key = `${Math.round(x * STEPS_PER_DEGREE)},${Math.round(y * STEPS_PER_DEGREE)}`;
    const known = pointAt.get(key);
    if (known !== undefined) return known;
    pointAt.set(key, lon.length);
    lon.push(x);
    lat.push(y);
    return lon.length - 1;
  };
  const uses: number[] = [];
  const ends: number[] = [];
  lines.forEach(({ points }, line) => {
    const course = points.map(point);
    for (let i = 1; i < course.length; i += 1) {
      if (course[i] === course[i - 1]) continue;
      stretches.push([course[i - 1], course[i], line]);
      for (const each of [course[i - 1], course[i]]) uses[each] = (uses[each] ?? 0) + 1;
    }
    ends.push(course[0], course[course.length - 1]);
  });
  const places = { lon: Float64Array.from(lon), lat: Float64Array.from(lat) };
  const joined = joinLooseEnds(
    places,
    stretches,
    ends.filter((end) => uses[end] === 1),
  );
  return connect(places, joined);
}

type Places = Pick<RiverGraph, 'lon' | 'lat'>;
type Stretch = [from: number, to: number, line: number];

/** Divides the stretches that loose ends come up to, so that these end on them. */
function joinLooseEnds(places: Places, stretches: readonly Stretch[], loose: readonly number[]): Stretch[] {
  if (loose.length === 0) return [...stretches];
  const finder = stretchFinder(places, stretches, JOIN_KM);
  const cuts = new Map<number, { at: number; share: number }[]>();
  const extra: Stretch[] = [];
  for (const end of new Set(loose)) {
    const hit = finder(places.lon[end], places.lat[end]).find(
      ({ stretch }) => stretches[stretch][0] !== end && stretches[stretch][1] !== end,
    );
    if (!hit) continue;
    const [from, to, line] = stretches[hit.stretch];
    // Beside the end of a stretch the two points are joined; between them the stretch is divided.
    if (hit.share < 1e-6) extra.push([end, from, line]);
    else if (hit.share > 1 - 1e-6) extra.push([end, to, line]);
    else cuts.set(hit.stretch, [...(cuts.get(hit.stretch) ?? []), { at: end, share: hit.share }]);
  }
  const all: Stretch[] = [...extra];
  stretches.forEach(([from, to, line], i) => {
    let last = from;
    for (const { at } of (cuts.get(i) ?? []).sort((a, b) => a.share - b.share)) {
      all.push([last, at, line]);
      last = at;
    }
    all.push([last, to, line]);
  });
  return all;
}

function connect(places: Places, stretches: readonly Stretch[]): RiverGraph {
  const points = places.lon.length;
  const [from, to, line] = [0, 1, 2].map((k) => Int32Array.from(stretches, (stretch) => stretch[k]));
  const start = new Int32Array(points + 1);
  for (let e = 0; e < from.length; e += 1) {
    start[from[e] + 1] += 1;
    start[to[e] + 1] += 1;
  }
  for (let i = 0; i < points; i += 1) start[i + 1] += start[i];
  const next = start.slice(0, points);
  const touching = new Int32Array(2 * from.length);
  for (let e = 0; e < from.length; e += 1) {
    touching[next[from[e]]++] = e;
    touching[next[to[e]]++] = e;
  }
  const part = new Int32Array(points).fill(-1);
  let parts = 0;
  for (let seed = 0; seed < points; seed += 1) {
    if (part[seed] >= 0) continue;
    const queue = [seed];
    part[seed] = parts;
    for (let at = queue.pop(); at !== undefined; at = queue.pop()) {
      for (let k = start[at]; k < start[at + 1]; k += 1) {
        const other = from[touching[k]] + to[touching[k]] - at;
        if (part[other] >= 0) continue;
        part[other] = parts;
        queue.push(other);
      }
    }
    parts += 1;
  }
  return { ...places, from, to, line, part, parts, start, touching };
}

/** A stretch near a place: how far, and at which share of its length, 0 to 1. */
export interface NearStretch {
  stretch: number;
  km: number;
  share: number;
}

const KM_PER_DEGREE = 111.195;
/** Smaller cells would only be more of them: stretches are seldom shorter. */
const LEAST_CELL_KM = 0.5;

/** A search for the stretches within `reachKm` of a place, nearest first, over a grid of cells as wide as the reach. */
export function stretchFinder(
  { lon, lat }: Places,
  stretches: readonly (readonly [number, number, number])[],
  reachKm: number,
): (longitude: number, latitude: number) => NearStretch[] {
  const cell = Math.max(reachKm, LEAST_CELL_KM) / KM_PER_DEGREE;
  // A degree of longitude is shortest at the layer's highest latitude: wide enough there is wide enough everywhere.
  const highest = lat.reduce((most, each) => Math.max(most, Math.abs(each)), 0);
  const wide = cell / Math.max(0.02, Math.cos((highest * Math.PI) / 180));
  const cells = new Map<string, number[]>();
  const enter = (x: number, y: number, i: number) => {
    const held = cells.get(`${x},${y}`);
    if (!held) cells.set(`${x},${y}`, [i]);
    else if (held[held.length - 1] !== i) held.push(i);
  };
  stretches.forEach(([from, to], i) => {
    // In steps of a cell at most, each step entered with the cells about it that it may cut.
    const [dx, dy] = [(lon[to] - lon[from]) / wide, (lat[to] - lat[from]) / cell];
    const [x, y] = [lon[from] / wide, lat[from] / cell];
    const steps = Math.max(1, Math.ceil(Math.max(Math.abs(dx), Math.abs(dy))));
    for (let k = 0; k < steps; k += 1) {
      const [x0, x1] = [x + (dx * k) / steps, x + (dx * (k + 1)) / steps].sort((a, b) => a - b);
      const [y0, y1] = [y + (dy * k) / steps, y + (dy * (k + 1)) / steps].sort((a, b) => a - b);
      for (let column = Math.floor(x0); column <= x1; column += 1) {
        for (let row = Math.floor(y0); row <= y1; row += 1) enter(column, row, i);
      }
    }
  });
  return (longitude, latitude) => {
    const [column, row] = [Math.floor(longitude / wide), Math.floor(latitude / cell)];
    const near = new Map<number, NearStretch>();
    for (let x = column - 1; x <= column + 1; x += 1) {
      for (let y = row - 1; y <= row + 1; y += 1) {
        for (const stretch of cells.get(`${x},${y}`) ?? []) {
          if (near.has(stretch)) continue;
          const [from, to] = stretches[stretch];
          const hit = nearestOn([lon[from], lat[from]], [lon[to], lat[to]], [longitude, latitude]);
          if (hit.km <= reachKm) near.set(stretch, { stretch, ...hit });
        }
      }
    }
    return [...near.values()].sort((a, b) => a.km - b.km || a.stretch - b.stretch);
  };
}

/** Nearest point of a short stretch to a place, on a plane that touches the Earth there. */
function nearestOn(
  a: readonly [number, number],
  b: readonly [number, number],
  [x, y]: readonly [number, number],
): { km: number; share: number } {
  const east = KM_PER_DEGREE * Math.cos((y * Math.PI) / 180);
  const [ax, ay] = [(a[0] - x) * east, (a[1] - y) * KM_PER_DEGREE];
  const [dx, dy] = [(b[0] - a[0]) * east, (b[1] - a[1]) * KM_PER_DEGREE];
  const squared = dx * dx + dy * dy;
  const share = squared === 0 ? 0 : Math.min(1, Math.max(0, -(ax * dx + ay * dy) / squared));
  return { km: Math.hypot(ax + share * dx, ay + share * dy), share };
}
