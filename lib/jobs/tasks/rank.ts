import type { Basis } from '../../basis.ts';
import { rankRegion } from '../../region/rank-stations.ts';
import type { Ranking, StationFacts } from '../../region/ranking-types.ts';
import { figuresByStation, type PackedMinima, unpackMinima } from '../pack-minima.ts';

/** The ranking of a region from its annual minima. In a worker, so that no page waits for it.
 *  @param task.figures    the basis's index where the minima do not bring it along, one a year of the packed minima
 *  @param task.yearStart  first month of the low-flow year, resolved */
export function rank(task: {
  stations: StationFacts[];
  minima: PackedMinima;
  figures: Float64Array | null;
  basis: Basis;
  yearStart: number;
}): Ranking {
  const minima = unpackMinima(task.minima);
  const figures = task.figures && figuresByStation(task.minima, task.figures);
  const stations = task.stations.map((station) => ({
    station,
    minima: minima.get(station.id)!,
    figures: figures?.get(station.id),
  }));
  return rankRegion(stations, task.basis, task.yearStart);
}
