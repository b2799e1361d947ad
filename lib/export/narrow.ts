import type { StationFacts } from '../region/ranking-types.ts';

/** Which stations a file is to hold: those named, those inside the bounds, or both at once. Nothing given: all. */
export interface Narrowing {
  codes?: readonly string[];
  /** degrees; west > east runs over the date line */
  bounds?: { west: number; south: number; east: number; north: number };
}

/** Leaves the rows of the stations asked for, in the order they had. Figures are untouched: ranks and adjusted p are
 *  always those of the whole region. A station without a place lies inside no bounds. */
export function narrowTo<Row>(
  rows: readonly Row[],
  { codes, bounds }: Narrowing,
  stationOf: (row: Row) => Pick<StationFacts, 'code' | 'latitude' | 'longitude'>,
): Row[] {
  const named = codes && new Set(codes);
  return rows.filter((row) => {
    const { code, latitude, longitude } = stationOf(row);
    if (named && !named.has(code)) return false;
    if (!bounds) return true;
    if (latitude === null || longitude === null) return false;
    const { west, south, east, north } = bounds;
    const between = west <= east ? longitude >= west && longitude <= east : longitude >= west || longitude <= east;
    return between && latitude >= south && latitude <= north;
  });
}
