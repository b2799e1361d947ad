import { createHash } from 'node:crypto';
import type { Basis } from '../basis.ts';
import { type ChanceSeries, medianLag1, type TestedRow } from '../region/chance-series.ts';
import type { Ranking, RankingRow } from '../region/ranking-types.ts';
import type { Chance } from '../region/regional-answers.ts';
import type { ChanceMethod } from '../region/regional-types.ts';
import { sieveTerms } from '../statistics/sieve.ts';
import { joinTrendBits, type TrendBits } from '../statistics/trend-bits.ts';
import { cached } from './cached.ts';
import { inLanes, type WorkContext } from './lanes.ts';
import { runTask } from './pool.ts';
import { derivedKey } from './result-key.ts';
import { chunksOf } from './share-out.ts';

/** How often chance is tried: an order of the years costs little, a replicate of the sieve five times as much, and one that
 *  needs a slope of its own to be whitened ten times as much again. */
const PERMUTATIONS = 10_000;
const SIEVED = 2_000;
const SIEVED_AND_WHITENED = 500;

/** Every piece draws all replicates' years again: so few pieces, yet enough for a progress that moves and for a cancel that is
 *  heard within a second or two. */
const PIECES = 16;
const FEWEST_A_PIECE = 20;

/** Key of what chance does to the stations of a ranking. */
export const chanceKey = (rankingKey: string, method: ChanceMethod): string => derivedKey('chance', rankingKey, method);

/** What chance does to every ranked station, replicate by replicate, so that any group of them is counted in a moment.
 *  @param key  of the ranking
 *  @throws an AbortError when cancelled */
export function chanceOf(
  { rows, basis }: Ranking,
  key: string,
  method: ChanceMethod,
  context: WorkContext = {},
): Promise<Chance> {
  return cached('chance', chanceKey(key, method), async () => {
    const { alpha, serialCorrection } = basis;
    const terms = { alpha, serialCorrection };
    const tested = rows.map(testedRow);
    const stations = await runTask('seriesForChance', { rows: tested, basis: terms });
    const ask = method === 'sieve' ? sieving(stations, terms) : permuting(stations);
    const places = chunksOf(
      stations.codes.map((_, i) => i),
      Math.max(FEWEST_A_PIECE, Math.ceil(stations.codes.length / PIECES)),
    );
    const parts = await inLanes('chance', places, (some) => ask(some, context), context);
    return { method, bits: joinTrendBits(parts), lag1: stations.lag1 };
  });
}

/** What chance reads of a row: a whole one takes longer to send to a worker. */
function testedRow({ code, rank, years, values, trendOf, serialFactor }: RankingRow): TestedRow {
  return { code, rank, years, values, trendOf, serialFactor };
}

/** Asks a worker for some stations, by place. */
type Asking = (places: number[], context: WorkContext) => Promise<TrendBits>;

function permuting(stations: ChanceSeries): Asking {
  const seed = seedOf(stations);
  return (places, context) => {
    const series = places.map((i) => stations.series[i]);
    const critical = places.map((i) => stations.critical[i]);
    return runTask('permuteYears', { series, critical, replicates: PERMUTATIONS, seed }, context);
  };
}

function sieving(stations: ChanceSeries, basis: Pick<Basis, 'alpha' | 'serialCorrection'>): Asking {
  const seed = seedOf(stations);
  const present = stations.series.map((series) => withoutGaps(stations.years, series));
  const terms = sieveTerms(
    present.map(({ years }) => years),
    medianLag1(stations.lag1) ?? 0,
  );
  const replicates = basis.serialCorrection === 'pre-whitened' ? SIEVED_AND_WHITENED : SIEVED;
  return (places, context) => {
    const some = places.map((i) => {
      const [code, slope, critical] = [stations.codes[i], stations.slopes[i], stations.corrected[i]];
      return { code, ...present[i], slope, critical };
    });
    return runTask('sieveYears', { stations: some, terms, basis, replicates, seed }, context);
  };
}

/** Only the years that have a value. */
function withoutGaps(years: Int32Array, series: Float64Array): { years: number[]; values: number[] } {
  const places = Array.from(series.keys()).filter((i) => !Number.isNaN(series[i]));
  return { years: places.map((i) => years[i]), values: places.map((i) => series[i]) };
}

/** Names the random draws by the series that they are made for: the same wherever and however often they are computed. */
function seedOf({ codes, years, series }: ChanceSeries): string {
  const hash = createHash('sha256').update(JSON.stringify([codes, Array.from(years)]));
  for (const values of series) hash.update(JSON.stringify(Array.from(values)));
  return hash.digest('hex');
}
