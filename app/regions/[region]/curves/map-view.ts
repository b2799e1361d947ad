import { parseView } from '../map-state';

/** The map's pane, about: its size depends on the window and is not in the address, so what counts as in view is good to
 *  the nearest hundred pixels. */
const PANE = { width: 760, height: 700 };
const TILE = 256;
/** Where the Mercator map ends. */
const MOST_LATITUDE = 85.0511;

/** Degrees that a map view covers (spherical Mercator), or null without a view that can be read.
 *  Example: at zoom 0 the whole world fits: west −180 … east 180 */
export function boundsOfView(text: string | null): { west: number; south: number; east: number; north: number } | null {
  const view = text === null ? null : parseView(text);
  if (!view) return null;
  const world = TILE * 2 ** view.zoom;
  const halfWidth = (PANE.width / 2 / world) * 360;
  const centre = mercator(Math.max(-MOST_LATITUDE, Math.min(MOST_LATITUDE, view.latitude)));
  const halfHeight = (PANE.height / 2 / world) * 2 * Math.PI;
  const whole = halfWidth >= 180;
  return {
    west: whole ? -180 : turned(view.longitude - halfWidth),
    east: whole ? 180 : turned(view.longitude + halfWidth),
    south: latitudeOf(centre - halfHeight),
    north: latitudeOf(centre + halfHeight),
  };
}

const mercator = (latitude: number): number => Math.log(Math.tan(Math.PI / 4 + (latitude * Math.PI) / 360));
const latitudeOf = (y: number): number => (Math.atan(Math.sinh(y)) * 180) / Math.PI;
const turned = (longitude: number): number => ((((longitude + 180) % 360) + 360) % 360) - 180;
