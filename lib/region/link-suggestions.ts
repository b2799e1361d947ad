import { areaSteps } from './links-by-area.ts';
import { riverSteps } from './links-by-river.ts';
import { byCode } from './places.ts';
import type { StationFacts } from './ranking-types.ts';
import type { RiverLine } from './river-lines.ts';

/** What a link between two stations rests on. */
export const LINK_SOURCES = ['person', 'river-layer', 'area-and-position'] as const;
export type LinkSource = (typeof LINK_SOURCES)[number];

/** A pair of stations of which one seems to be the next below the other. Only a person makes a link of it. */
export interface LinkSuggestion {
  /** codes */
  upstream: string;
  downstream: string;
  source: Exclude<LinkSource, 'person'>;
  /** why, in words and figures */
  reason: string;
}

/** How far from a line of the river layer a station may stand, km: coordinates are often rounded to 0.01°. */
const SNAP_KM = 1;

/** Suggests, for each station that has no station below it yet, the next one downstream: along the river layer where the
 *  station stands on it, else by name of the river, area and place.
 *  @param lines  of the region's river layers; none is no layer
 *  @param links  those that stand already, by code: they are not suggested again, nor is a second station below
 *  @param snapKm how far from a line a station may stand, above 0
 *  @returns by code of the upper station
 *  @throws RangeError when snapKm is not above 0 */
export function suggestLinks(
  stations: readonly StationFacts[],
  lines: readonly RiverLine[],
  links: readonly { upstream: string; downstream: string }[] = [],
  { snapKm = SNAP_KM } = {},
): LinkSuggestion[] {
  if (!(snapKm > 0)) throw new RangeError(`suggestLinks: snapKm must be above 0, got ${snapKm}`);
  const linked = new Set(links.map(({ upstream }) => upstream));
  const { steps, placed } = riverSteps(stations, lines, { reachKm: snapKm });
  const byRiver = steps.map(
    ({ upstream, downstream, km }): LinkSuggestion => ({
      upstream: upstream.code,
      downstream: downstream.code,
      source: 'river-layer',
      reason: `Next station down the river layer, ${kilometres(km)} along the line; ${areaWords(upstream, downstream)}.`,
    }),
  );
  // A station that the layer leads nowhere is the last one on its line; one beside every line may still have a name.
  const besideLines = new Set(stations.filter(({ code }) => !placed.has(code)).map(({ code }) => code));
  const byArea = areaSteps(stations)
    .filter(({ upstream, downstream }) => besideLines.has(upstream.code) || besideLines.has(downstream.code))
    .map(
      ({ upstream, downstream, km, ratio }): LinkSuggestion => ({
        upstream: upstream.code,
        downstream: downstream.code,
        source: 'area-and-position',
        reason: `Next larger drainage area on ${downstream.river.trim()}, ${ratio.toFixed(ratio < 10 ? 1 : 0)} times as large, ${kilometres(km)} away as the crow flies.`,
      }),
    );
  const led = new Set(byRiver.map(({ upstream }) => upstream));
  return [...byRiver, ...byArea.filter(({ upstream }) => !led.has(upstream))]
    .filter(({ upstream }) => !linked.has(upstream))
    .sort((a, b) => byCode(a.upstream, b.upstream));
}

const kilometres = (km: number): string => `${km.toFixed(km < 10 ? 1 : 0)} km`;

function areaWords(upper: StationFacts, lower: StationFacts): string {
  const without = [upper, lower].filter(({ areaKm2 }) => areaKm2 === null);
  if (without.length > 0) return `no drainage area is known of ${without.map(({ code }) => code).join(' and ')}`;
  const area = (km2: number | null) => Number(km2!.toPrecision(4)).toLocaleString('en');
  return `the drainage area goes from ${area(upper.areaKm2)} to ${area(lower.areaKm2)} km²`;
}
