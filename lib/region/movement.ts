import { kendallTauB } from '../statistics/kendall-tau.ts';
import { median } from '../statistics/quantile.ts';
import { orNull } from './or-null.ts';
import { byCode, placesOf } from './places.ts';
import type { Ranking, RankingRow } from './ranking-types.ts';
import type { Movement, RankingMovement } from './window-types.ts';

/** Who moves further than this share of the stations ranked in both has moved far. */
const FAR_SHARE = 0.1;

/** Two rankings of one region compared: who moved, and how far.
 *  @param before  on the other terms
 *  @param after   on the terms at hand
 *  Source: agreement of places by Kendall's tau-b, see `kendallTauB`. */
export function rankingMovement(before: Ranking, after: Ranking): RankingMovement {
  const rankedBefore = rankedByCode(before);
  const rankedAfter = rankedByCode(after);
  const both = [...rankedAfter.keys()].filter((code) => rankedBefore.has(code));
  const placesBefore = placesAmong(both, rankedBefore);
  const placesAfter = placesAmong(both, rankedAfter);
  const moved = new Map(both.map((code, i) => [code, placesBefore[i] - placesAfter[i]]));
  const distances = [...moved.values()].map(Math.abs);

  const rows = new Map([...rowsByCode(before), ...rowsByCode(after)]);
  const trendsBefore = rowsByCode(before);
  const trendsAfter = rowsByCode(after);
  const movements: Movement[] = [];
  for (const [code, { name }] of rows) {
    if (!rankedBefore.has(code) && !rankedAfter.has(code)) continue;
    movements.push({
      code,
      name,
      before: rankedBefore.get(code)?.rank ?? null,
      after: rankedAfter.get(code)?.rank ?? null,
      moved: moved.get(code) ?? null,
      trendBefore: trendsBefore.get(code)?.trend ?? null,
      trendAfter: trendsAfter.get(code)?.trend ?? null,
    });
  }
  return {
    rankedBefore: rankedBefore.size,
    rankedAfter: rankedAfter.size,
    rankedBoth: both.length,
    tau: orNull(kendallTauB(placesBefore, placesAfter)),
    movedFar: distances.filter((distance) => distance > FAR_SHARE * both.length).length,
    medianMove: orNull(median(distances)),
    fallingBefore: before.counts.falling,
    fallingAfter: after.counts.falling,
    risingBefore: before.counts.rising,
    risingAfter: after.counts.rising,
    movements: movements.sort(byDistance),
  };
}

const rowsByCode = ({ rows }: Ranking): Map<string, RankingRow> => new Map(rows.map((row) => [row.code, row]));

function rankedByCode({ rows }: Ranking): Map<string, RankingRow> {
  return new Map(rows.filter(({ rank }) => rank !== null).map((row) => [row.code, row]));
}

/** Places of some stations among themselves, in the order of `codes`. */
function placesAmong(codes: readonly string[], ranked: ReadonlyMap<string, RankingRow>): number[] {
  return placesOf(codes.map((code) => ({ figure: ranked.get(code)!.rank, code }))).place;
}

/** Furthest first, either way; then those ranked in one only; equals by code. */
function byDistance(a: Movement, b: Movement): number {
  const distance = ({ moved }: Movement) => (moved === null ? -1 : Math.abs(moved));
  return distance(b) - distance(a) || byCode(a.code, b.code);
}
