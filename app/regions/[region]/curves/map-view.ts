/** The map's pane, about: its size depends on the window and is not in the address, so what counts as in view is good to
 *  the nearest hundred pixels. */
const PANE = { width: 760, height: 700 };
const TILE = 256;
/** Where the Mercator map ends. */
const MOST_LATITUDE = 85.0511;

/** Degrees that a map view covers (spherical Mercator), or null without a view that can be read.
 *  Example: at zoom 0 the whole world fits: west −180 … east 180 */
export function boundsOfView(text: string | null): { west: number; south: number; east: number; north: number } | null {
  const view = text === null ? null : readView(text);
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

/** A map view as the address holds it: "latitude,longitude,zoom". Read here as well as on the map, because the map's own
 *  reader belongs to the browser and these bounds are taken on the server. */
function readView(text: string): { latitude: number; longitude: number; zoom: number } | null {
  const match = /^(-?[\d.]+),(-?[\d.]+),([\d.]+)$/.exec(text);
  if (!match) return null;
  const [latitude, longitude, zoom] = match.slice(1).map(Number);
  if (![latitude, longitude, zoom].every(Number.isFinite) || Math.abs(latitude) > 90 || zoom > 20) return null;
  return { latitude, longitude, zoom };
}
