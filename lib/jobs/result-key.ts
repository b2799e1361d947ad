import { createHash } from 'node:crypto';
import { type Basis, type BasisKey, basisText, type ResolvedBasis } from '../basis.ts';
import { METHODS_VERSION } from '../region/methods-version.ts';
import type { StationFacts } from '../region/ranking-types.ts';

/** What a station brings to an analysis: its facts and what its record says. */
export interface StationInput {
  facts: StationFacts;
  /** hash of the record and the marks laid over it; null without a record */
  dataHash: string | null;
}

/** Which facts an analysis reads. `none`: only the record, whose hash speaks of the area where depths become flows. */
export type FactsRead = 'all' | 'none';

/** Key of a result: SHA-256 of all that it depends on, and of nothing else.
 *
 *  That is the analysis, METHODS_VERSION, the basis keys that the analysis reads, and for every station of the region,
 *  sorted by code, its record hash (marks included) and the facts used. Stations of one region belong together, for a
 *  neighbour changes adjusted p and the common period. Station ids are part of it since results name stations by id.
 *  @returns 64 hexadecimal digits */
export function resultKey(
  analysis: string,
  basis: { values: Basis | ResolvedBasis; keys: readonly BasisKey[] },
  stations: readonly StationInput[],
  factsRead: FactsRead = 'all',
): string {
  const hash = createHash('sha256');
  hash.update(JSON.stringify([analysis, METHODS_VERSION, basisText(basis.values, basis.keys)]));
  const lines = stations.map(({ facts, dataHash }) =>
    JSON.stringify([facts.code, facts.id, dataHash, ...(factsRead === 'all' ? factsOf(facts) : [])]),
  );
  for (const line of lines.sort()) hash.update(`\n${line}`);
  return hash.digest('hex');
}

/** Key of a result that is made of another one, and of nothing else but what is named here.
 *  Example: derivedKey('certainty', rankingKey, 500) */
export function derivedKey(analysis: string, key: string, ...terms: (string | number)[]): string {
  return createHash('sha256')
    .update(JSON.stringify([analysis, key, ...terms]))
    .digest('hex');
}

function factsOf({ name, river, latitude, longitude, areaKm2, influence, derivedFrom }: StationFacts) {
  const measured = [name, river, latitude, longitude, areaKm2, influence];
  return derivedFrom === undefined ? measured : [...measured, derivedFrom];
}
