import type { Basis } from '../../basis.ts';
import { rankRegion } from '../../region/rank-stations.ts';
import type { Ranking, StationFacts } from '../../region/ranking-types.ts';
import { type PackedMinima, unpackMinima } from '../pack-minima.ts';

/** The ranking of a region from its annual minima. In a worker, so that no page waits for it.
 *  @param task.yearStart  first month of the low-flow year, resolved */
export function rank(task: {
  stations: StationFacts[];
  minima: PackedMinima;
  basis: Basis;
  yearStart: number;
}): Ranking {
  const minima = unpackMinima(task.minima);
  const stations = task.stations.map((station) => ({ station, minima: minima.get(station.id)! }));
  return rankRegion(stations, task.basis, task.yearStart);
}
