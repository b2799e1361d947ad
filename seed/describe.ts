import type { StationFacts } from '../lib/region/ranking-types.ts';
import type { NamedFlow, StationChange } from '../lib/series/station-history.ts';
import type { Drainage } from './drainage.ts';
import { CELL_KM2 } from './hex-grid.ts';
import { historyOf } from './history.ts';
import { toDegrees } from './layers.ts';
import { placeNames } from './names.ts';
import { type River, riverPoints } from './rivers.ts';
import type { Site } from './sites.ts';
import type { Traits } from './traits.ts';

export interface SeedStation extends Omit<StationFacts, 'id'> {
  /** dated changes: what, and since when */
  changes: StationChange[];
  namedFlows: NamedFlow[];
  notes: string;
}

/** Names, places, areas and histories of the stations, in the order of their sites. */
export function describeStations(
  seed: number,
  drainage: Drainage,
  rivers: readonly River[],
  sites: readonly Site[],
  traits: readonly Traits[],
  riverNames: readonly string[],
): SeedStation[] {
  const points = riverPoints(drainage, rivers);
  const places = placeNames(seed);
  const digits = Math.max(3, String(sites.length).length);
  const codes = sites.map((_, i) => `VM${String(i + 1).padStart(digits, '0')}`);
  return sites.map((site, i) => {
    const [longitude, latitude] = toDegrees(points.get(site.cell) ?? drainage.grid.centre(site.cell));
    return {
      code: codes[i],
      name: `${riverNames[site.river]} at ${places.next().value}`,
      river: riverNames[site.river],
      latitude,
      longitude,
      areaKm2: traits[i].spring ? null : Math.round(site.cells * CELL_KM2 * 10) / 10,
      ...historyOf(seed, i, sites, traits, codes),
      notes: traits[i].notes,
    };
  });
}
