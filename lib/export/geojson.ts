import type { StationFacts } from '../region/ranking-types.ts';
import type { SureRow } from '../region/sure-rows.ts';
import type { Cell } from './csv.ts';
import { RANKING_COLUMNS } from './ranking-csv.ts';

export interface Feature {
  type: 'Feature';
  id: string;
  /** longitude, latitude; null when the station's place is not known (RFC 7946, section 3.2) */
  geometry: { type: 'Point'; coordinates: [number, number] } | null;
  properties: Record<string, unknown>;
}

export interface FeatureCollection {
  type: 'FeatureCollection';
  features: Feature[];
}

/** A station as a GeoJSON point with the properties given; every station is there, with or without a place. */
export function stationFeature(
  station: Pick<StationFacts, 'code' | 'latitude' | 'longitude'>,
  properties: Record<string, unknown>,
): Feature {
  const { latitude, longitude } = station;
  const placed = latitude !== null && longitude !== null;
  return {
    type: 'Feature',
    id: station.code,
    geometry: placed ? { type: 'Point', coordinates: [longitude, latitude] } : null,
    properties,
  };
}

/** Stations with their facts. */
export function stationsGeojson(stations: readonly StationFacts[]): FeatureCollection {
  return {
    type: 'FeatureCollection',
    features: stations.map((station) =>
      stationFeature(station, {
        station_code: station.code,
        station_name: station.name,
        river: station.river,
        drainage_area_km2: station.areaKm2,
        influence: station.influence,
      }),
    ),
  };
}

/** The ranking with the same property names as the CSV has columns; the coordinates stand in the geometry. */
export function rankingGeojson(rows: readonly SureRow[]): FeatureCollection {
  const columns = RANKING_COLUMNS.filter(({ name }) => name !== 'latitude' && name !== 'longitude');
  return {
    type: 'FeatureCollection',
    features: rows.map((row) =>
      stationFeature(row, Object.fromEntries(columns.map(({ name, value }) => [name, jsonCell(value(row))]))),
    ),
  };
}

/** JSON has no NaN: a missing number is null. */
export function jsonCell(cell: Cell): Cell {
  return typeof cell === 'number' && !Number.isFinite(cell) ? null : cell;
}
