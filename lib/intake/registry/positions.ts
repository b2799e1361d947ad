import type { Correction, RegistryOptions, RegistryStation } from '../types.ts';
import { outside } from './registry-row.ts';
import type { RowProblem } from './row-problem.ts';

/** A station of a registry with the row that it stands in. */
export interface PlacedRow {
  station: RegistryStation;
  line: number;
  text: string;
}

interface Place {
  latitude: number;
  longitude: number;
}

/** Degrees within which a corrected station must lie of the others, so that a slip of the pen is not taken for a swap. */
const PLAUSIBLE = 30;
/** A station that could be where it is said to be is taken for swapped when it lies at least so far from the others, and
 *  swapped a quarter as far. */
const FAR = 15;

/** Latitudes between which rivers flow, but for melt water in Antarctica. */
const SOUTHERNMOST = -60;
const NORTHERNMOST = 84;

/** What became of the positions: rows put right as asked, and rows that ask for a correction or have none. */
export interface Positions {
  rows: PlacedRow[];
  corrected: Partial<Record<Correction, number>>;
  /** what would put rows right, and the rows; the first of several that are needed */
  asks: {
    correction: Exclude<Correction, 'none'>;
    rows: PlacedRow[];
    /** each of them may stand as it is, unlikely as it looks */
    unlikely: boolean;
  } | null;
  problems: { row: PlacedRow; problem: RowProblem }[];
}

/** Looks whether positions lie on Earth and near one another. Latitude and longitude may be swapped: positions that
 *  cannot be but swapped can, or that lie far from the others (or from `near`) but swapped do not. Longitudes may run
 *  from 0 to 360. Nothing is corrected that is not asked for. */
export function checkPositions(given: readonly PlacedRow[], options: RegistryOptions): Positions {
  const asked = new Set(options.corrections ?? []);
  const corrected: Positions['corrected'] = {};
  let rows = [...given];
  const swapped = swappedRows(rows, options.near ?? null);
  if (asked.has('swap-coordinates')) {
    // Where nothing tells which rows are swapped, all are: it was asked for.
    const wrong = new Set(swapped.length > 0 ? swapped : rows);
    rows = rows.map((row) => (wrong.has(row) ? withPlace(row, swap) : row));
    corrected['swap-coordinates'] = wrong.size;
  } else {
    const unlikely = swapped.every((row) => mayStand(row));
    if (swapped.length > 0 && !(unlikely && asked.has('none')))
      return { rows, corrected, asks: { correction: 'swap-coordinates', rows: swapped, unlikely }, problems: [] };
  }
  const wide = rowsPast180(rows);
  if (asked.has('longitude-360')) {
    const past = new Set(wide);
    rows = rows.map((row) => (past.has(row) ? withPlace(row, turn) : row));
    corrected['longitude-360'] = wide.length;
  } else if (wide.length > 0) {
    return { rows, corrected, asks: { correction: 'longitude-360', rows: wide, unlikely: false }, problems: [] };
  }
  const problems = rows.flatMap((row) => {
    const { latitude, longitude } = row.station;
    if (latitude !== null && !(Math.abs(latitude) <= 90))
      return [{ row, problem: outside('latitude', String(latitude)) }];
    if (longitude !== null && !(Math.abs(longitude) <= 180))
      return [{ row, problem: outside('longitude', String(longitude)) }];
    return [];
  });
  return { rows, corrected, asks: null, problems };
}

const placeOf = ({ station: { latitude, longitude } }: PlacedRow): Place | null =>
  latitude === null || longitude === null ? null : { latitude, longitude };
const swap = ({ latitude, longitude }: Place): Place => ({ latitude: longitude, longitude: latitude });
const turn = ({ latitude, longitude }: Place): Place => ({
  latitude,
  longitude: longitude > 180 ? longitude - 360 : longitude,
});
const isOnEarth = ({ latitude, longitude }: Place): boolean =>
  Math.abs(latitude) <= 90 && longitude >= -180 && longitude <= 360;

const isOnRivers = (place: Place): boolean =>
  isOnEarth(place) && place.latitude >= SOUTHERNMOST && place.latitude <= NORTHERNMOST;

function mayStand(row: PlacedRow): boolean {
  const place = placeOf(row);
  return place !== null && isOnEarth(place);
}

function withPlace(row: PlacedRow, change: (place: Place) => Place): PlacedRow {
  const place = placeOf(row);
  return place === null ? row : { ...row, station: { ...row.station, ...change(place) } };
}

/** The middle of places: the median latitude and longitude. */
function middle(places: readonly Place[]): Place {
  const median = (values: number[]) => values.sort((a, b) => a - b)[values.length >> 1];
  return {
    latitude: median(places.map(({ latitude }) => latitude)),
    longitude: median(places.map((place) => turn(place).longitude)),
  };
}

/** The larger of the differences in latitude and in longitude, degrees. */
function distance(a: Place, b: Place): number {
  const across = Math.abs(turn(a).longitude - turn(b).longitude);
  return Math.max(Math.abs(a.latitude - b.latitude), Math.min(across, 360 - across));
}

/** Rows that are swapped by all appearance. */
function swappedRows(rows: readonly PlacedRow[], near: RegistryOptions['near'] | null): PlacedRow[] {
  const placed = rows.flatMap((row) => {
    const place = placeOf(row);
    return place === null ? [] : [{ row, place, other: swap(place), possible: isOnRivers(place) }];
  });
  const possible = placed.filter((one) => one.possible);
  const impossible = placed.filter((one) => !one.possible && isOnRivers(one.other));
  // Where most rows can only be swapped, the columns are: all rows then lie together when they are swapped.
  const turned = impossible.length > possible.length ? middle(impossible.map(({ other }) => other)) : null;
  const columnsSwapped = turned !== null && possible.every(({ other }) => distance(other, turned) <= PLAUSIBLE * 1.5);
  const trusted =
    columnsSwapped || possible.length === 0 ? impossible.map(({ other }) => other) : possible.map(({ place }) => place);
  if (trusted.length === 0) return [];
  const centre = near ? { latitude: (near[1] + near[3]) / 2, longitude: (near[0] + near[2]) / 2 } : middle(trusted);
  // A layer's own size is no distance.
  const size = near ? Math.max(near[2] - near[0], near[3] - near[1]) / 2 : 0;
  const enough = near !== null || trusted.length >= 3;
  return placed.flatMap(({ row, place, other, possible }) => {
    if (!isOnRivers(other)) return [];
    const [here, there] = [place, other].map((one) => Math.max(0, distance(one, centre) - size));
    if (!possible) return there <= PLAUSIBLE ? [row] : [];
    const wrong = columnsSwapped ? there < here : here > FAR && there < here / 4 && there < FAR;
    return enough && wrong ? [row] : [];
  });
}

/** Rows whose longitude lies beyond 180, and near the others when it is counted to the west. */
function rowsPast180(rows: readonly PlacedRow[]): PlacedRow[] {
  const placed = rows.flatMap((row) => {
    const place = placeOf(row);
    return place !== null && isOnEarth(place) ? [{ row, place }] : [];
  });
  const past = placed.filter(({ place }) => place.longitude > 180);
  if (past.length === 0) return [];
  const centre = middle(placed.map(({ place }) => place));
  return past.filter(({ place }) => distance(place, centre) <= PLAUSIBLE * 2).map(({ row }) => row);
}
