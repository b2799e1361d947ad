import { BASIS_KEYS, type Basis } from '../basis.ts';
import type { Ranking } from '../region/ranking-types.ts';
import type { RegionRow } from '../store/regions.ts';
import { cached } from './cached.ts';
import { indexFiguresOf } from './index-figures.ts';
import { packedMinimaOf } from './minima.ts';
import { runTask } from './pool.ts';
import { withInputs } from './region-inputs.ts';
import { resultKey, type StationInput } from './result-key.ts';

/** `normalise` never decides who is ranked, and `units` only how numbers are shown. */
const KEYS = BASIS_KEYS.filter((key) => key !== 'normalise' && key !== 'units');

/** Key of the ranking of stations under a basis. */
export const rankingKey = (stations: readonly StationInput[], basis: Basis): string =>
  resultKey('ranking', { values: basis, keys: KEYS }, stations);

/** The ranking of a region under a basis.
 *  @returns `key`: equal exactly when all that the ranking depends on is equal, good as an ETag
 *  @throws BasisError when the season does not fit into the low-flow year */
export async function rankingOf(
  region: Pick<RegionRow, 'id'>,
  basis: Basis,
): Promise<{ ranking: Ranking; key: string }> {
  return withInputs(region.id, async (inputs) => {
    const key = rankingKey(inputs, basis);
    const ranking = await cached('ranking', key, async () => {
      const minima = await packedMinimaOf(inputs, basis);
      const figures = await indexFiguresOf(inputs, minima, basis);
      const { packed, yearStart } = minima;
      return runTask('rank', { stations: inputs.map(({ facts }) => facts), minima: packed, figures, basis, yearStart });
    });
    const { normalise, units } = basis;
    return { ranking: { ...ranking, basis: { ...ranking.basis, normalise, units } }, key };
  });
}
