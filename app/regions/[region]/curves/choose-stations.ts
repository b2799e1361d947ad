import { FIRST_CHOICE, type StationChoice } from './curves-view';
import { boundsOfView } from './map-view';

interface Choosable {
  code: string;
  rank: number | null;
  latitude: number | null;
  longitude: number | null;
}

/** Codes of the stations that a choice stands for, in the order of the ranking.
 *  Without a map view in the address, "in view" is every station that has a place. */
export function chooseStations(
  stations: readonly Choosable[],
  choice: StationChoice,
  mapView: string | null,
): string[] {
  const named = choice.way === 'codes' ? new Set(choice.codes) : null;
  const bounds = choice.way === 'view' ? boundsOfView(mapView) : null;
  const picked = stations.filter((station) => {
    if (named) return named.has(station.code);
    if (choice.way !== 'view') return true;
    if (station.latitude === null || station.longitude === null) return false;
    return bounds === null || inside(bounds, station.latitude, station.longitude);
  });
  const codes = picked.map((station) => station.code);
  return choice.way === 'steepest' ? codes.slice(0, FIRST_CHOICE) : codes;
}

interface Bounds {
  west: number;
  south: number;
  east: number;
  north: number;
}

function inside({ west, south, east, north }: Bounds, latitude: number, longitude: number): boolean {
  const between = west <= east ? longitude >= west && longitude <= east : longitude >= west || longitude <= east;
  return between && latitude >= south && latitude <= north;
}
