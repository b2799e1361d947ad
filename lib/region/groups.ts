import { type Corner, inPolygon } from './in-polygon.ts';
import { INFLUENCES, type Influence, type RankingRow } from './ranking-types.ts';

/** A set of stations that is looked at together. */
export interface Group {
  /** all, influence:natural, …, drawn */
  id: string;
  /** names the stations, in the plural and in the singular. Example: "natural stations", "natural station" */
  label: string;
  single: string;
  influence: Influence | null;
  rows: RankingRow[];
}

const INFLUENCE_LABELS: Record<Influence, [label: string, single: string]> = {
  natural: ['natural stations', 'natural station'],
  regulated: ['regulated stations', 'regulated station'],
  abstracted: ['stations with abstraction', 'station with abstraction'],
  augmented: ['augmented stations', 'augmented station'],
  'spring-fed': ['spring-fed stations', 'spring-fed station'],
  urban: ['urban stations', 'urban station'],
  unknown: ['stations of unknown influence', 'station of unknown influence'],
};

/** The groups of ranked stations that a region is asked about: all, those of each influence that there is, so that climate
 *  and management are told apart, and those inside an area.
 *  @param ranked  ranked rows, in the order of the ranking
 *  @param area    as drawn on the map; null: none was */
export function groupsOf(ranked: readonly RankingRow[], area: readonly Corner[] | null): Group[] {
  const all: Group = { id: 'all', label: 'stations', single: 'station', influence: null, rows: [...ranked] };
  const byInfluence = INFLUENCES.map((influence): Group => {
    const [label, single] = INFLUENCE_LABELS[influence];
    const rows = ranked.filter((row) => row.influence === influence);
    return { id: `influence:${influence}`, label, single, influence, rows };
  }).filter(({ rows }) => rows.length > 0);
  if (area === null) return [all, ...byInfluence];
  const drawn: Group = {
    id: 'drawn',
    label: 'stations in the area drawn',
    single: 'station in the area drawn',
    influence: null,
    rows: ranked.filter((row) => inPolygon(area, row)),
  };
  return [all, ...byInfluence, drawn];
}
