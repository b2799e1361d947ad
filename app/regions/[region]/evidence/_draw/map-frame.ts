import type { Corner } from '@/lib/region/in-polygon';
import { worldX, worldY } from '../../_map/ground-shapes.ts';

/** From degrees to CSS pixels of a small map that shows all stations (Web Mercator): world pixels × scale − left. */
export interface MapFrame {
  width: number;
  height: number;
  scale: number;
  left: number;
  top: number;
}

export interface Place {
  longitude: number;
  latitude: number;
}

const MARGIN = 28;
const LEAST_HEIGHT = 220;
const MOST_HEIGHT = 460;
/** Of one station alone, or of stations at one place: about ten kilometres a hundred pixels. */
const LARGEST_SCALE = 2048;

/** A frame as wide as asked for, and as tall as the stations' box wants within limits.
 *  @returns null when no station has a place */
export function frameMap(places: readonly Place[], width: number): MapFrame | null {
  if (places.length === 0) return null;
  let [west, east, north, south] = [Infinity, -Infinity, Infinity, -Infinity];
  for (const { longitude, latitude } of places) {
    const [x, y] = [worldX(longitude), worldY(latitude)];
    west = Math.min(west, x);
    east = Math.max(east, x);
    north = Math.min(north, y);
    south = Math.max(south, y);
  }
  const [wide, high] = [east - west, south - north];
  const room = width - 2 * MARGIN;
  const height = Math.min(MOST_HEIGHT, Math.max(LEAST_HEIGHT, wide > 0 ? (high * room) / wide + 2 * MARGIN : 0));
  const scale = Math.min(LARGEST_SCALE, room / Math.max(wide, 1e-9), (height - 2 * MARGIN) / Math.max(high, 1e-9));
  return {
    ...{ width, height, scale },
    left: ((west + east) / 2) * scale - width / 2,
    top: ((north + south) / 2) * scale - height / 2,
  };
}

export const toPixels = (frame: MapFrame, { longitude, latitude }: Place): [x: number, y: number] => [
  worldX(longitude) * frame.scale - frame.left,
  worldY(latitude) * frame.scale - frame.top,
];

/** The inverse of toPixels. */
export function toCorner(frame: MapFrame, x: number, y: number): Corner {
  const longitude = (360 * (x + frame.left)) / (frame.scale * 256) - 180;
  const angle = Math.PI * (1 - (y + frame.top) / (frame.scale * 128));
  return [longitude, (Math.atan(Math.sinh(angle)) * 180) / Math.PI];
}
