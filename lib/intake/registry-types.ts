import type { StationFacts } from '../region/ranking-types.ts';
import type { AreaUnit } from '../series/area-units.ts';
import type { DerivedRecipe, NamedFlow, StationChange } from '../series/station-history.ts';
import type { Correction } from './intake-error.ts';

/** One row of a station registry. */
export interface RegistryStation extends Omit<StationFacts, 'id' | 'derivedFrom'> {
  changes?: StationChange[];
  namedFlows?: NamedFlow[];
  notes?: string;
  derived?: DerivedRecipe | null;
}

export const REGISTRY_FACTS = [
  ...(['name', 'river', 'latitude', 'longitude', 'areaKm2', 'influence'] as const),
  ...(['changes', 'namedFlows', 'notes', 'derived'] as const),
] as const;
export type RegistryFact = (typeof REGISTRY_FACTS)[number];

/** What a person says of a registry, and what is known beside it. */
export interface RegistryOptions {
  /** of its coordinates; without them a registry that seems to need one is refused */
  corrections?: readonly Correction[];
  /** name of the sheet of a workbook */
  sheet?: string;
  /** unit of areas that the file does not name */
  areaUnit?: AreaUnit;
  /** where the region lies by its layers and stations, as west, south, east, north: tells swapped coordinates */
  near?: readonly [number, number, number, number] | null;
}

/** A registry file, read whole. A registry with any bad row is refused with all of its bad rows named. */
export interface Registry {
  stations: RegistryStation[];
  rows: number;
  /** the facts that the file has columns for; what it does not speak of stays as it is */
  given: RegistryFact[];
  sha256: string;
  warnings: string[];
}

/** A map layer, checked: lines or polygons in longitude and latitude. */
export interface LayerFile {
  name: string;
  kind: 'river' | 'catchment' | 'other';
  /** a FeatureCollection as text */
  geojson: string;
  features: number;
  /** west, south, east, north */
  bounds: [number, number, number, number];
  sha256: string;
  warnings: string[];
}
