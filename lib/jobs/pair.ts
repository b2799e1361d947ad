import { createHash } from 'node:crypto';
import type { Basis, ResolvedBasis } from '../basis.ts';
import type { PairSite, PairTerms } from '../region/pair.ts';
import type { PairComparison, ReferenceCandidate } from '../region/pair-types.ts';
import type { RankingRow } from '../region/ranking-types.ts';
import { referenceCandidates, referencesToBeginWith } from '../region/reference-candidates.ts';
import type { RegionRow } from '../store/regions.ts';
import { runTask } from './pool.ts';
import { rankingOf } from './ranking.ts';

/** Thrown for a comparison that cannot be meant: the message names the code and says what would do. */
export class PairError extends Error {
  override name = 'PairError';
}

export interface PairAnswer {
  comparison: PairComparison;
  basis: ResolvedBasis;
  /** equal exactly when all that the comparison depends on is equal, good as an ETag */
  key: string;
}

/** A station against reference stations under a basis; null when the region has no such station.
 *  @param references  codes; none: `referencesToBeginWith`
 *  @throws PairError for a code that is not there, the station itself, one code twice, and where none are named and there
 *          is no natural station to begin with */
export async function pairOf(
  region: Pick<RegionRow, 'id' | 'name'>,
  basis: Basis,
  code: string,
  references: readonly string[] | null,
): Promise<PairAnswer | null> {
  const { ranking, key } = await rankingOf(region, basis);
  const rowOf = new Map(ranking.rows.map((row) => [row.code, row]));
  const station = rowOf.get(code);
  if (!station) return null;
  const codes = references ?? referencesToBeginWith(referenceCandidates(code, ranking.rows), station.years.length);
  if (codes.length === 0) {
    throw new PairError(
      `No natural station shares enough usable years with "${code}" to be taken by itself: name the references.`,
    );
  }
  codes.forEach((each, i) => {
    if (!rowOf.has(each)) throw new PairError(`${region.name} has no station "${each}" to compare with.`);
    if (each === code) throw new PairError(`"${code}" cannot be its own reference: name other stations.`);
    if (codes.indexOf(each) !== i) throw new PairError(`"${each}" is named twice as reference: name it once.`);
  });
  const compared = siteOf(station);
  const others = codes.map((each) => siteOf(rowOf.get(each)!));
  const terms = termsOf(ranking.basis);
  // by what is compared and not by the key, which knows stations by the numbers that they have in this database
  const seed = digest([terms, [compared, ...others].map(({ code, years, values }) => [code, years, values])]);
  const comparison = await runTask('pair', { station: compared, references: others, terms, seed });
  return { comparison, basis: ranking.basis, key: digest([key, code, codes]) };
}

const digest = (parts: unknown): string =>
  createHash('sha256')
    .update(JSON.stringify(['pair', parts]))
    .digest('hex');

/** The natural stations that may serve a station as references, best first. */
export async function candidatesOf(
  region: Pick<RegionRow, 'id'>,
  basis: Basis,
  code: string,
): Promise<{ candidates: ReferenceCandidate[]; key: string }> {
  const { ranking, key } = await rankingOf(region, basis);
  return { candidates: referenceCandidates(code, ranking.rows), key };
}

function siteOf({ code, name, river, influence, derivedFrom, years, values, drying }: RankingRow): PairSite {
  return { code, name, river, influence, derivedFrom, years, values, drying };
}

function termsOf({ index, days, period, serialCorrection, alpha }: ResolvedBasis): PairTerms {
  return { index, days, period, serialCorrection, alpha };
}
