import { type Basis, BasisError } from '../basis.ts';
import { type AlternativeTerms, alternativeTerms } from '../region/alternative-terms.ts';
import { alternative } from '../region/alternatives.ts';
import type { Ranking } from '../region/ranking-types.ts';
import type { Alternative } from '../region/window-types.ts';
import type { RegionRow } from '../store/regions.ts';
import { cached } from './cached.ts';
import type { WorkContext } from './lanes.ts';
import { rankingOf } from './ranking.ts';
import { derivedKey } from './result-key.ts';

/** Key of the alternatives to a ranking. */
export const alternativesKey = (rankingKey: string): string => derivedKey('alternatives', rankingKey);

/** The ranking under other choices of each term, one term at a time, against the one under the basis.
 *
 *  One after the other, for each already has all workers: the answer for a large region takes about as many times as
 *  long as a ranking as there are lengths, start months and seasons to try.
 *  @throws an AbortError when cancelled; rankings that were computed by then are kept */
export async function alternativesOf(
  region: Pick<RegionRow, 'id'>,
  basis: Basis,
  { signal, onProgress }: WorkContext = {},
): Promise<Alternative[]> {
  const { ranking, key } = await rankingOf(region, basis);
  return cached('alternatives', alternativesKey(key), async () => {
    const terms = alternativeTerms(basis, ranking.basis);
    const answers: Alternative[] = [];
    for (const each of terms) {
      signal?.throwIfAborted();
      answers.push(await under(region, each, ranking));
      const done = answers.length;
      onProgress?.({ stage: 'alternatives', done, of: terms.length, share: done / terms.length });
    }
    return answers;
  });
}

async function under(region: Pick<RegionRow, 'id'>, terms: AlternativeTerms, atHand: Ranking): Promise<Alternative> {
  if (terms.basis === null) return alternative(terms, atHand, null, terms.problem);
  try {
    return alternative(terms, atHand, (await rankingOf(region, terms.basis)).ranking);
  } catch (error) {
    // a season may not fit into the year that the records make
    if (!(error instanceof BasisError)) throw error;
    return alternative(terms, atHand, null, error.message);
  }
}
