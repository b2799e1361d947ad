import { distanceKm } from './neighbours.ts';
import { byCode } from './places.ts';
import type { StationFacts } from './ranking-types.ts';

/** A station and the one that its area and place make out as the next below it. */
export interface AreaStep {
  upstream: StationFacts;
  downstream: StationFacts;
  /** as the crow flies */
  km: number;
  /** area of the lower one over that of the upper one */
  ratio: number;
}

/** Length of the main stream of a catchment, km (Hack 1957, USGS PP 294-B: 1.4 A^0.6 in miles and square miles). A
 *  station inside the catchment cannot lie much farther from its outlet. */
export const streamLengthKm = (areaKm2: number): number => 1.4 * 1.609344 * (areaKm2 / 1.609344 ** 2) ** 0.6;

/** Streams are up to half as long again as Hack's median. */
const LENGTH_SLACK = 1.5;
/** Areas nearer than this tell nothing of which station is the lower one. */
const LEAST_RATIO = 1.02;

/** For each station, the one with the next larger drainage area on the river of the same name that is near enough for the
 *  first to lie in its catchment. Stations without a river, an area or a place are passed over. */
export function areaSteps(stations: readonly StationFacts[]): AreaStep[] {
  const rivers = new Map<string, StationFacts[]>();
  for (const station of stations) {
    const river = station.river.trim().toLowerCase();
    if (river !== '' && station.areaKm2 !== null && station.areaKm2 > 0) {
      rivers.set(river, [...(rivers.get(river) ?? []), station]);
    }
  }
  return [...rivers.values()].flatMap((onRiver) => {
    const inOrder = [...onRiver].sort((a, b) => a.areaKm2! - b.areaKm2! || byCode(a.code, b.code));
    return inOrder.flatMap((upstream, i): AreaStep[] => {
      for (const downstream of inOrder.slice(i + 1)) {
        const km = distanceKm(upstream, downstream);
        const ratio = downstream.areaKm2! / upstream.areaKm2!;
        if (km === null || ratio < LEAST_RATIO) continue;
        if (km <= LENGTH_SLACK * streamLengthKm(downstream.areaKm2!)) return [{ upstream, downstream, km, ratio }];
      }
      return [];
    });
  });
}
