import { byCode } from './places.ts';
import type { StationFacts } from './ranking-types.ts';
import type { DependentPair } from './regional-types.ts';

/** Two stations of one river share most of their water when the smaller area is more than this share of the larger. */
const SHARED_AREA = 0.5;

/** Stations whose deseasonalised log flows correlate by more than this are taken for one. */
export const SHARED_FLOW = 0.95;

/** A station with what decides which of two is kept. */
export type LastingStation = Pick<StationFacts, 'code' | 'river' | 'areaKm2'> & {
  /** days with a value in its record */
  valuedDays: number;
};

/** Two stations, by code, and the correlation of their deseasonalised log flows. */
export interface FlowCorrelation {
  a: string;
  b: string;
  correlation: number;
}

/** Leaves stations out until no two share water: of two on one river with areas alike, or with flows that go together, the
 *  one with the longer record is kept; of equally long ones that with the lower code.
 *
 *  Stations are taken from the longest record on, each unless it shares water with one that was taken: so a station falls
 *  out only beside one that stays. Rivers are the same when their names are, without regard to case and outer spaces.
 *  @param correlated  pairs of stations that correlate by more than SHARED_FLOW
 *  @returns           `kept`: codes that stay; `pairs`: for each station left out the longest record that it stands beside,
 *                     by code */
export function independentSet(
  stations: readonly LastingStation[],
  correlated: readonly FlowCorrelation[],
): { kept: Set<string>; pairs: DependentPair[] } {
  const flowsWith = new Map<string, Map<string, number>>();
  const note = (from: string, to: string, correlation: number) =>
    flowsWith.set(from, (flowsWith.get(from) ?? new Map<string, number>()).set(to, correlation));
  for (const { a, b, correlation } of correlated) {
    note(a, b, correlation);
    note(b, a, correlation);
  }
  const longestFirst = stations
    .map((station) => ({ ...station, river: station.river.trim().toLowerCase() }))
    .sort((a, b) => b.valuedDays - a.valuedDays || byCode(a.code, b.code));
  const kept: LastingStation[] = [];
  const pairs: DependentPair[] = [];
  for (const station of longestFirst) {
    const beside = firstBeside(station, kept, flowsWith.get(station.code));
    if (beside) pairs.push(beside);
    else kept.push(station);
  }
  return { kept: new Set(kept.map(({ code }) => code)), pairs: pairs.sort((a, b) => byCode(a.left, b.left)) };
}

/** The first of the stations kept that shares water with one; null when none does. */
function firstBeside(
  station: LastingStation,
  kept: readonly LastingStation[],
  flows: ReadonlyMap<string, number> | undefined,
): DependentPair | null {
  for (const other of kept) {
    const ratio = areaRatio(other, station);
    if (ratio > SHARED_AREA) return { kept: other.code, left: station.code, reason: 'area-ratio', figure: ratio };
    const correlation = flows?.get(other.code) ?? 0;
    if (correlation > SHARED_FLOW) {
      return { kept: other.code, left: station.code, reason: 'correlation', figure: correlation };
    }
  }
  return null;
}

/** The smaller drainage area over the larger where both lie on one river; NaN where they do not, or an area is not known. */
function areaRatio(a: LastingStation, b: LastingStation): number {
  if (a.river === '' || a.river !== b.river || a.areaKm2 === null || b.areaKm2 === null) return Number.NaN;
  return Math.min(a.areaKm2, b.areaKm2) / Math.max(a.areaKm2, b.areaKm2);
}
