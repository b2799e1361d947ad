import type { Basis } from '../basis.ts';
import { areaToText, type Corner } from '../region/in-polygon.ts';
import type { ChanceMethod, RegionalAnswers } from '../region/regional-types.ts';
import type { RegionRow } from '../store/regions.ts';
import { cached, keptResult } from './cached.ts';
import { chanceKey, chanceOf } from './chance.ts';
import type { WorkContext } from './lanes.ts';
import { runTask } from './pool.ts';
import { rankingKey, rankingOf } from './ranking.ts';
import { RecordsChangedError, withInputs } from './region-inputs.ts';
import { derivedKey } from './result-key.ts';
import { sharedWaterOf } from './shared-water.ts';

/** What is asked of a region beside the basis. */
export interface RegionalQuestion {
  method: ChanceMethod;
  /** as drawn on the map; null: none was */
  area: readonly Corner[] | null;
}

/** Key of the regional answers to a ranking. */
export const regionalKey = (rankingKey: string, { method, area }: RegionalQuestion): string =>
  derivedKey('regional', rankingKey, method, area === null ? '' : areaToText(area));

/** Whether the long part of the answers to a ranking is kept already, so that another area is answered in a moment. */
export const chanceIsKept = (rankingKey: string, method: ChanceMethod): boolean =>
  keptResult('chance', chanceKey(rankingKey, method)) !== null;

/** What the ranked stations of a region say together; again from the beginning when a record changed after the ranking was
 *  read.
 *  @throws an AbortError when cancelled; what was done by then of either half is lost, a half that was done is kept */
export function regionalOf(
  region: Pick<RegionRow, 'id'>,
  basis: Basis,
  question: RegionalQuestion,
  context: WorkContext = {},
): Promise<RegionalAnswers> {
  return withInputs(region.id, async (inputs) => {
    const { ranking, key } = await rankingOf(region, basis);
    return cached('regional', regionalKey(key, question), async () => {
      if (rankingKey(inputs, basis) !== key)
        throw new RecordsChangedError('A record changed while the ranking was read.');
      const water = await sharedWaterOf(inputs, basis, part(context, 0));
      const chance = await chanceOf(ranking, key, question.method, part(context, 0.5));
      return runTask('regional', { ranking, chance, water, area: question.area }, context);
    });
  });
}

/** The context of one of two halves of the work. */
function part({ signal, onProgress }: WorkContext, begun: 0 | 0.5): WorkContext {
  return { signal, onProgress: (progress) => onProgress?.({ ...progress, share: begun + progress.share / 2 }) };
}
