/** A corner of an area on the map: longitude, latitude, degrees. */
export type Corner = readonly [number, number];

/** Most corners that an area in an address may have. */
export const MOST_CORNERS = 60;
const FEWEST_CORNERS = 3;

/** Of a degree: about a metre. */
const DECIMALS = 5;

/** Whole turns by which a place may lie away from the area's own longitudes: an area may run over the date line. */
const TURNS = [0, 360, -360] as const;

/** An area as text for an address. Example: [[7.5, 47], [8, 47], [8, 47.25]] → "7.5,47;8,47;8,47.25" */
export function areaToText(area: readonly Corner[]): string {
  return area.map((corner) => corner.map(rounded).join(',')).join(';');
}

/** As an address has it; never −0. */
const rounded = (degrees: number): number => Number(degrees.toFixed(DECIMALS)) + 0;

/** Reads an area of an address, to the five decimals of `areaToText`, by whose text an answer is kept.
 *  @returns the corners; else in words what is wrong and what would do */
export function areaFromText(text: string): { area: Corner[] } | { problem: string } {
  const pieces = text.split(';');
  if (pieces.length < FEWEST_CORNERS || pieces.length > MOST_CORNERS) {
    return { problem: `an area has ${FEWEST_CORNERS} to ${MOST_CORNERS} corners, this one has ${pieces.length}` };
  }
  const area: Corner[] = [];
  for (const [i, piece] of pieces.entries()) {
    const corner = /^\s*(-?\d+(?:\.\d+)?)\s*,\s*(-?\d+(?:\.\d+)?)\s*$/.exec(piece);
    const [longitude, latitude] = [Number(corner?.[1]), Number(corner?.[2])];
    if (!(Math.abs(longitude) <= 360 && Math.abs(latitude) <= 90)) {
      return { problem: `corner ${i + 1} of the area must be longitude,latitude in degrees, not "${piece}"` };
    }
    area.push([rounded(longitude), rounded(latitude)]);
  }
  return { area };
}

/** Whether a place lies inside an area or on its edge. An area whose edges cross holds what an odd number of its edges
 *  lies beside (the even–odd rule), as maps fill it.
 *  @param area   corners in order, the last one joined to the first; longitudes may run on past ±180° over the date line
 *  @param place  null in either coordinate: it lies nowhere
 *  @throws RangeError when the area has fewer than three corners
 *  Source: ray crossing, Shimrat 1962, Commun. ACM 5:434. */
export function inPolygon(
  area: readonly Corner[],
  { longitude, latitude }: { longitude: number | null; latitude: number | null },
): boolean {
  if (area.length < FEWEST_CORNERS) {
    throw new RangeError(`inPolygon: area must have at least ${FEWEST_CORNERS} corners, got ${area.length}`);
  }
  if (longitude === null || latitude === null) return false;
  return TURNS.some((turn) => holds(area, longitude + turn, latitude));
}

function holds(area: readonly Corner[], x: number, y: number): boolean {
  let inside = false;
  let [fromX, fromY] = area[area.length - 1];
  for (const [toX, toY] of area) {
    const across = (toX - fromX) * (y - fromY) - (x - fromX) * (toY - fromY);
    const beside = Math.min(fromX, toX) <= x && x <= Math.max(fromX, toX);
    if (across === 0 && beside && Math.min(fromY, toY) <= y && y <= Math.max(fromY, toY)) return true;
    // an edge that ends at the height of the place counts at one of its ends only
    if (fromY > y !== toY > y && x < fromX + ((y - fromY) / (toY - fromY)) * (toX - fromX)) inside = !inside;
    [fromX, fromY] = [toX, toY];
  }
  return inside;
}
