import type { Influence, StationFacts } from '../region/ranking-types.ts';
import { deriveText } from '../series/derive.ts';
import type { DerivedRecipe, NamedFlow, StationChange } from '../series/station-history.ts';
import { rows, sharedConnection } from './connection.ts';
import { changesOf, namedFlowsOf, recipeOf } from './history-text.ts';
import { openStore } from './open.ts';

export { type StationRecord, stationRecords } from './records.ts';
export { upsertRegistry } from './registry.ts';

export type { StationChange };

export interface StationRow extends StationFacts {
  changes: StationChange[];
  notes: string;
  namedFlows: NamedFlow[];
  /** null for a measured station */
  derived: DerivedRecipe | null;
}

const FACTS = {
  id: true,
  code: true,
  name: true,
  river: true,
  latitude: true,
  longitude: true,
  areaKm2: true,
  influence: true,
} as const;

const ALL = { ...FACTS, changes: true, notes: true, namedFlows: true, derived: true } as const;

const LIST_SQL = `SELECT ${Object.keys(FACTS).join(', ')}, derived FROM Station WHERE regionId = ? ORDER BY code`;

type FactsRow = [
  ...[number, string, string, string, number | null, number | null, number | null, Influence],
  derived: string | null,
];

/** The facts of a region's stations, by code. By libsql alone: every answer about a region begins with them, and for
 *  2,000 stations Prisma takes twice as long. */
export async function listStations(regionId: number): Promise<StationFacts[]> {
  const found = rows(sharedConnection(openStore().path), LIST_SQL).all([regionId]) as FactsRow[];
  return found.map(([id, code, name, river, latitude, longitude, areaKm2, influence, derived]) => ({
    ...{ id, code, name, river, latitude, longitude, areaKm2, influence },
    ...(derived === null ? {} : { derivedFrom: deriveText(recipeOf(derived)!) }),
  }));
}

/** All that is known of a region's stations, by code. */
export async function listStationRows(regionId: number): Promise<StationRow[]> {
  const found = await openStore().prisma.station.findMany({
    where: { regionId },
    select: ALL,
    orderBy: { code: 'asc' },
  });
  return found.map(toRow);
}

/** One station by its code, or null. */
export async function getStation(regionId: number, code: string): Promise<StationRow | null> {
  const row = await openStore().prisma.station.findUnique({
    where: { regionId_code: { regionId, code } },
    select: ALL,
  });
  return row && toRow(row);
}

interface Stored extends Omit<StationFacts, 'influence'> {
  influence: string;
  changes: string;
  notes: string;
  namedFlows: string;
  derived: string | null;
}

function toRow({ influence, changes, namedFlows, derived, ...row }: Stored): StationRow {
  return {
    ...{ ...row, influence: influence as Influence },
    ...{ changes: changesOf(changes), namedFlows: namedFlowsOf(namedFlows), derived: recipeOf(derived) },
  };
}
