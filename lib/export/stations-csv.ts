import type { StationFacts } from '../region/ranking-types.ts';
import { type Column, csvTable } from './csv.ts';
import { RANKING_COLUMNS } from './ranking-csv.ts';

const described = (name: string) => RANKING_COLUMNS.find((column) => column.name === name)!.description;

/** The facts of a station under the names that the ranking has, so that a registry can be read back in. */
export const STATION_COLUMNS: readonly Column<StationFacts>[] = [
  { name: 'station_code', datatype: 'string', description: described('station_code'), value: (row) => row.code },
  { name: 'station_name', datatype: 'string', description: described('station_name'), value: (row) => row.name },
  { name: 'river', datatype: 'string', description: described('river'), value: (row) => row.river },
  { name: 'latitude', datatype: 'number', description: described('latitude'), value: (row) => row.latitude },
  { name: 'longitude', datatype: 'number', description: described('longitude'), value: (row) => row.longitude },
  {
    name: 'drainage_area_km2',
    datatype: 'number',
    description: described('drainage_area_km2'),
    value: (row) => row.areaKm2,
  },
  { name: 'influence', datatype: 'string', description: described('influence'), value: (row) => row.influence },
];

/** The stations of a region as CSV. */
export function stationsCsv(stations: readonly StationFacts[]): string {
  return csvTable(STATION_COLUMNS, stations);
}
