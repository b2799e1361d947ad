import type { Basis } from '@/lib/basis';
import { pairOf } from '@/lib/jobs/pair';
import { type WeatherAnswer, WeatherError, weatherOf } from '@/lib/jobs/weather';
import type { PairComparison, ReferenceCandidate } from '@/lib/region/pair-types';
import type { RankingRow } from '@/lib/region/ranking-types';
import { referenceCandidates, referencesToBeginWith } from '@/lib/region/reference-candidates';
import type { StationChange } from '@/lib/series/station-history';
import type { RegionRow } from '@/lib/store/regions';
import { getStation } from '@/lib/store/stations';
import type { PairView } from './pair-view';

/** All that the page shows of a station. */
export interface PairAnswers {
  station: RankingRow | null;
  /** why the address' station cannot be shown */
  unknownStation: string | null;
  candidates: ReferenceCandidate[];
  /** codes of the references in use; empty when there are none */
  references: string[];
  /** true while the program chose them */
  ownChoice: boolean;
  comparison: PairComparison | null;
  weather: WeatherAnswer | null;
  /** what of the address could not be followed */
  problems: string[];
  changes: StationChange[];
}

/** What the page shows for a view; what of it cannot be followed is said, and the rest shown. */
export async function pairAnswers(
  region: RegionRow,
  basis: Basis,
  view: PairView,
  rows: readonly RankingRow[],
): Promise<PairAnswers> {
  const station = rows.find(({ code }) => code === view.station) ?? null;
  const nothing = {
    ...{ station, candidates: [], references: [], ownChoice: false, comparison: null, weather: null },
    ...{ problems: [], changes: [], unknownStation: null },
  };
  if (!station) {
    if (view.station === null) return nothing;
    return { ...nothing, unknownStation: `${region.name} has no station “${view.station}”.` };
  }
  const problems: string[] = [];
  const candidates = referenceCandidates(station.code, rows);
  const ownChoice = view.references === null;
  const references = usable(
    view.references ?? referencesToBeginWith(candidates, station.years.length),
    station,
    rows,
    problems,
  );
  const [pair, weather, stored] = await Promise.all([
    references.length > 0 ? pairOf(region, basis, station.code, references) : null,
    weatherOf(region, basis, station.code, view.weather).catch((error: unknown) => {
      if (!(error instanceof WeatherError)) throw error;
      problems.push(error.message);
      return weatherOf(region, basis, station.code);
    }),
    getStation(region.id, station.code),
  ]);
  const comparison = pair?.comparison ?? null;
  const changes = stored?.changes ?? [];
  return { ...nothing, station, candidates, references, ownChoice, comparison, weather, problems, changes };
}

/** The references that can be used; why the others cannot goes to `problems`. */
function usable(
  asked: readonly string[],
  station: RankingRow,
  rows: readonly RankingRow[],
  problems: string[],
): string[] {
  return asked.filter((code) => {
    if (code === station.code) {
      problems.push(`${station.name || code} cannot be its own reference.`);
      return false;
    }
    if (rows.some((row) => row.code === code)) return true;
    problems.push(`There is no station “${code}” to compare with.`);
    return false;
  });
}
