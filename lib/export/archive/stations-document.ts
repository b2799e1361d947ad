import { listStationRows } from '../../store/stations.ts';
import { type FeatureCollection, stationFeature } from '../geojson.ts';

/** All that is known of a region's stations as GeoJSON points, by code; a registry that gives the same stations again. */
export async function stationsDocument(regionId: number): Promise<FeatureCollection> {
  const stations = await listStationRows(regionId);
  return {
    type: 'FeatureCollection',
    features: stations.map((station) =>
      stationFeature(station, {
        ...{ station_code: station.code, station_name: station.name, river: station.river },
        ...{ drainage_area_km2: station.areaKm2, influence: station.influence },
        ...{
          changes: station.changes,
          named_flows: station.namedFlows,
          notes: station.notes,
          derived: station.derived,
        },
      }),
    ),
  };
}
