import { byCode } from './places.ts';
import type { StationFacts } from './ranking-types.ts';

/** Mean radius of the Earth, km (IUGG). */
const EARTH_RADIUS_KM = 6371.0088;

export interface Neighbour {
  code: string;
  name: string;
  /** great-circle distance; null when the place of either station is not known */
  km: number | null;
}

type Place = Pick<StationFacts, 'code' | 'name' | 'river' | 'latitude' | 'longitude'>;

/** The stations nearest to one, nearest first; equal distances by code. Stations without a place are left out, and a
 *  station without a place has no neighbours.
 *  @param most  how many at most, a whole number of at least 0
 *  @throws RangeError when `most` is not such a number */
export function nearestStations(here: Place, stations: readonly Place[], most: number): Neighbour[] {
  if (!(Number.isInteger(most) && most >= 0)) {
    throw new RangeError(`nearestStations: most must be a whole number of at least 0, got ${most}`);
  }
  return neighboursAmong(here, stations)
    .filter(({ km }) => km !== null)
    .slice(0, most);
}

/** The other stations on the same river, nearest first, those without a place last. Names are compared without regard
 *  to case and outer spaces; a station that names no river has none. */
export function stationsOnRiver(here: Place, stations: readonly Place[]): Neighbour[] {
  const river = riverKey(here);
  if (river === '') return [];
  return neighboursAmong(
    here,
    stations.filter((station) => riverKey(station) === river),
  );
}

const riverKey = ({ river }: Place): string => river.trim().toLowerCase();

function neighboursAmong(here: Place, stations: readonly Place[]): Neighbour[] {
  return stations
    .filter(({ code }) => code !== here.code)
    .map((station) => ({ code: station.code, name: station.name, km: distanceKm(here, station) }))
    .sort((a, b) => {
      const [from, to] = [a.km ?? Number.POSITIVE_INFINITY, b.km ?? Number.POSITIVE_INFINITY];
      return from === to ? byCode(a.code, b.code) : from - to;
    });
}

/** Great-circle distance on a sphere by the haversine formula, good to 0.5 %; null when either place is not known. */
export function distanceKm(
  a: Pick<StationFacts, 'latitude' | 'longitude'>,
  b: Pick<StationFacts, 'latitude' | 'longitude'>,
): number | null {
  if (a.latitude === null || a.longitude === null || b.latitude === null || b.longitude === null) return null;
  const radians = Math.PI / 180;
  const halfLatitude = ((b.latitude - a.latitude) * radians) / 2;
  const halfLongitude = ((b.longitude - a.longitude) * radians) / 2;
  const haversine =
    Math.sin(halfLatitude) ** 2 +
    Math.cos(a.latitude * radians) * Math.cos(b.latitude * radians) * Math.sin(halfLongitude) ** 2;
  return 2 * EARTH_RADIUS_KM * Math.asin(Math.min(1, Math.sqrt(haversine)));
}
