import type { Certainty } from '../region/certainty-types.ts';
import type { Ranking } from '../region/ranking-types.ts';
import { simulatedRow } from '../region/simulated-family.ts';
import { cached } from './cached.ts';
import { inLanes, type WorkContext } from './lanes.ts';
import { runTask, THREADS } from './pool.ts';
import { derivedKey } from './result-key.ts';
import { chunksOf, STATIONS_PER_TASK } from './share-out.ts';

const REPLICATES = 500;

/** Key of how sure a ranking is. */
export const certaintyKey = (rankingKey: string): string => derivedKey('certainty', rankingKey, REPLICATES);

/** How sure the places of a ranking are, and what its records could have shown: simulated in the workers, then kept.
 *  @param key  of the ranking
 *  @throws an AbortError when cancelled; nothing is kept of what was done by then */
export function certaintyOf(
  { ranking: { rows, basis }, key }: { ranking: Ranking; key: string },
  context: WorkContext = {},
): Promise<Certainty> {
  return cached('certainty', certaintyKey(key), async () => {
    const simulated = rows.filter(({ rank, drying }) => rank !== null || drying).map(simulatedRow);
    const { rankBy, serialCorrection, alpha, index } = basis;
    const terms = await runTask('certaintyTerms', {
      rows: simulated,
      basis: { rankBy, serialCorrection, alpha, index },
      replicates: REPLICATES,
    });
    // a small region too has work for every worker
    const size = Math.min(STATIONS_PER_TASK, Math.ceil(simulated.length / THREADS));
    const chunks = chunksOf(simulated, Math.max(1, size));
    const parts = await inLanes(
      'certainty',
      chunks,
      (chunk) => runTask('simulate', { rows: chunk, terms }, context),
      context,
    );
    const transfer = parts.map(({ figures }) => figures.buffer);
    return runTask('certainty', { rows: simulated, parts, terms }, { ...context, transfer });
  });
}
