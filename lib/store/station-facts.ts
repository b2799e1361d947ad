import type { Influence } from '../region/ranking-types.ts';

/** What a registry says of a station. A fact that is absent here is left as it stands; null says that there is none. */
export interface StationInput {
  code: string;
  name?: string;
  river?: string;
  latitude?: number | null;
  longitude?: number | null;
  areaKm2?: number | null;
  influence?: Influence;
}

export const FACT_NAMES = ['name', 'river', 'latitude', 'longitude', 'areaKm2', 'influence'] as const;
export type FactName = (typeof FACT_NAMES)[number];
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
});

/** What one registry did to one station: whether it made it, and each fact it changed, as [before, after]. */
export interface FactChange {
  code: string;
  made: boolean;
  fields: Partial<Record<FactName, [FactValue, FactValue]>>;
}

/** Lays what a registry says over a station's facts, changing `facts`. @returns what changed */
export function layFacts(
  facts: Facts,
  input: StationInput,
  given: readonly FactName[] = FACT_NAMES,
): FactChange['fields'] {
  const fields: FactChange['fields'] = {};
  for (const name of given) {
    const value = input[name];
    if (value === undefined || value === facts[name]) continue;
    fields[name] = [facts[name], value];
    facts[name] = value;
  }
  return fields;
}
