import type { FoundFacts } from '../intake/types.ts';
import type { Influence } from '../region/ranking-types.ts';
import type { DerivedRecipe, NamedFlow, StationChange } from '../series/station-history.ts';
import { changesText, namedFlowsText, recipeText } from './history-text.ts';

/** What a registry says of a station. A fact that is absent here is left as it stands; null says that there is none. */
export interface StationInput {
  code: string;
  name?: string;
  river?: string;
  latitude?: number | null;
  longitude?: number | null;
  areaKm2?: number | null;
  influence?: Influence;
  changes?: readonly StationChange[];
  namedFlows?: readonly NamedFlow[];
  notes?: string;
  derived?: DerivedRecipe | null;
}

export const FACT_NAMES = [
  ...(['name', 'river', 'latitude', 'longitude', 'areaKm2', 'influence'] as const),
  ...(['changes', 'namedFlows', 'notes', 'derived'] as const),
] as const;
export type FactName = (typeof FACT_NAMES)[number];
/** As its column holds it: lists and recipes as JSON text. */
export type FactValue = string | number | null;
export type Facts = Record<FactName, FactValue>;

/** A station as files that only name its code make it. */
export const bareFacts = (code: string): Facts => ({
  name: code,
  river: '',
  latitude: null,
  longitude: null,
  areaKm2: null,
  influence: 'unknown',
  changes: '[]',
  namedFlows: '[]',
  notes: '',
  derived: null,
});

/** What one import said of one station: whether it made it, and every fact it spoke of, as [before, after]; both are equal
 *  where it left the fact as it stood, so that it is known to stand by it too. */
export interface FactChange {
  code: string;
  made: boolean;
  fields: Partial<Record<FactName, [FactValue, FactValue]>>;
  /** facts that only fill in what is empty, as offered: those found in a file of flows */
  offers?: Partial<Record<FactName, FactValue>>;
}

/** True when an import changed a fact of a station that was there before it. */
export const isChanged = ({ made, fields }: FactChange): boolean =>
  !made && Object.values(fields).some(([before, after]) => before !== after);

/** A fact as its column holds it; undefined where the entry does not speak of it. */
export function factOf(input: StationInput, name: FactName): FactValue | undefined {
  if (name === 'changes') return input.changes && changesText(input.changes);
  if (name === 'namedFlows') return input.namedFlows && namedFlowsText(input.namedFlows);
  if (name === 'derived') return input.derived === undefined ? undefined : recipeText(input.derived);
  return input[name];
}

/** Lays what a registry says over a station's facts, changing `facts`. @returns what it said, fact for fact */
export function layFacts(
  facts: Facts,
  input: StationInput,
  given: readonly FactName[] = FACT_NAMES,
): FactChange['fields'] {
  const fields: FactChange['fields'] = {};
  for (const name of given) {
    const value = factOf(input, name);
    if (value === undefined) continue;
    fields[name] = [facts[name], value];
    facts[name] = value;
  }
  return fields;
}

const FOUND = ['name', 'river', 'latitude', 'longitude', 'areaKm2'] as const;

/** True for a fact that nobody has stated yet. */
export const isEmptyFact = (code: string, name: FactName, value: FactValue): boolean => value === bareFacts(code)[name];

/** Fills what is empty of a station's facts with those that a file of flows states, changing `facts`. A position comes
 *  whole or not at all. */
export function fillFacts(facts: Facts, found: FoundFacts): Pick<FactChange, 'fields' | 'offers'> {
  const { code, latitude, longitude } = found;
  const placed = latitude !== undefined && longitude !== undefined;
  const fields: FactChange['fields'] = {};
  const offers: FactChange['offers'] = {};
  for (const name of FOUND) {
    const value = found[name];
    if (value === undefined || value === '') continue;
    if ((name === 'latitude' || name === 'longitude') && !placed) continue;
    const before = facts[name];
    if (isEmptyFact(code, name, before)) facts[name] = value;
    fields[name] = [before, facts[name]];
    offers[name] = value;
  }
  return { fields, offers };
}
