import { createHash } from 'node:crypto';
import { FACT_NAMES, type Facts, factOf } from './station-facts.ts';
import type { StationRow } from './stations.ts';

/** Names the state of all that can be edited of a station: equal exactly when every fact, list and recipe is equal. */
export function editionOf(station: StationRow): string {
  return editionOfFacts(Object.fromEntries(FACT_NAMES.map((name) => [name, factOf(station, name)])) as Facts);
}

/** The same of facts as their columns hold them. */
export function editionOfFacts(facts: Facts): string {
  return createHash('sha256')
    .update(JSON.stringify(FACT_NAMES.map((name) => facts[name])))
    .digest('hex')
    .slice(0, 32);
}
