import { createHash } from 'node:crypto';
import type { Basis } from '../basis.ts';
import { type ChanceSeries, medianLag1, type TestedRow } from '../region/chance-series.ts';
import type { Ranking, RankingRow } from '../region/ranking-types.ts';
import type { Chance } from '../region/regional-answers.ts';
import type { ChanceMethod } from '../region/regional-types.ts';
import { joinSums } from '../region/sieved-chance.ts';
import { sieveTerms } from '../statistics/sieve.ts';
import { joinTrendBits, noTrendBits, type TrendBits } from '../statistics/trend-bits.ts';
import { cached } from './cached.ts';
import { inLanes, type WorkContext } from './lanes.ts';
import { runTask } from './pool.ts';
import { derivedKey } from './result-key.ts';
import { chunksOf } from './share-out.ts';

/** How often chance is tried: an order of the years costs little, a replicate of the sieve, with its slope and its lag-1
 *  correlation, some thirty times as much. */
const PERMUTATIONS = 10_000;
const SIEVED = 1_000;

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
    const stations = await runTask('seriesForChance', { rows: rows.map(testedRow), basis: terms });
    const bits = method === 'sieve' ? await sieveAll(stations, terms, context) : await permuteAll(stations, context);
    return { method, bits, lag1: stations.lag1 };
  });
}

/** What chance reads of a row: a whole one takes longer to send to a worker. */
function testedRow({ code, rank, years, values, trendOf, serialFactor }: RankingRow): TestedRow {
  return { code, rank, years, values, trendOf, serialFactor };
}

/** Has the workers do every piece of the stations, by place. */
function inPieces<Answer>(
  { codes }: ChanceSeries,
  context: WorkContext,
  work: (places: number[]) => Promise<Answer>,
): Promise<Answer[]> {
  const places = chunksOf(
    codes.map((_, i) => i),
    Math.max(FEWEST_A_PIECE, Math.ceil(codes.length / PIECES)),
  );
  return inLanes('chance', places, work, context);
}

async function permuteAll(stations: ChanceSeries, context: WorkContext): Promise<TrendBits> {
  const seed = seedOf(stations);
  const parts = await inPieces(stations, context, (places) => {
    const series = places.map((i) => stations.series[i]);
    const critical = places.map((i) => stations.critical[i]);
    return runTask('permuteYears', { series, critical, replicates: PERMUTATIONS, seed }, context);
  });
  return parts.length === 0 ? noTrendBits(0, PERMUTATIONS) : joinTrendBits(parts);
}

async function sieveAll(
  stations: ChanceSeries,
  basis: Pick<Basis, 'alpha' | 'serialCorrection'>,
  context: WorkContext,
): Promise<TrendBits> {
  if (stations.codes.length === 0) return noTrendBits(0, SIEVED);
  const seed = seedOf(stations);
  const present = stations.series.map((series) => withoutGaps(stations.years, series));
  const terms = sieveTerms(
    present.map(({ years }) => years),
    medianLag1(stations.lag1) ?? 0,
  );
  const parts = await inPieces(stations, context, (places) => {
    const some = places.map((i) => ({ code: stations.codes[i], ...present[i], slope: stations.slopes[i] }));
    return runTask('sieveYears', { stations: some, terms, basis, replicates: SIEVED, seed }, context);
  });
  const lengths = present.map(({ years }) => years.length);
  return runTask('settleYears', { sums: joinSums(parts), lengths, critical: stations.corrected, basis }, context);
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
