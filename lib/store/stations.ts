import type { Influence, StationFacts } from '../region/ranking-types.ts';
import { openStore } from './open.ts';

export { type StationRecord, stationRecords } from './records.ts';
export { upsertRegistry } from './registry.ts';

/** A dated change on the river or at the gauge: a dam, an abstraction, a new weir or rating. */
export interface StationChange {
  /** ISO date */
  date: string;
  kind: string;
  note: string;
}

export interface StationRow extends StationFacts {
  changes: StationChange[];
  notes: string;
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

/** The facts of a region's stations, by code. */
export async function listStations(regionId: number): Promise<StationFacts[]> {
  const found = await openStore().prisma.station.findMany({
    where: { regionId },
    select: FACTS,
    orderBy: { code: 'asc' },
  });
  return found.map((row) => ({ ...row, influence: row.influence as Influence }));
}

/** One station by its code, or null. */
export async function getStation(regionId: number, code: string): Promise<StationRow | null> {
  const row = await openStore().prisma.station.findUnique({
    where: { regionId_code: { regionId, code } },
    select: { ...FACTS, changes: true, notes: true },
  });
  return row && { ...row, influence: row.influence as Influence, changes: JSON.parse(row.changes) };
}
