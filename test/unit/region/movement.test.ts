import { expect, test } from 'vitest';
import { rankingMovement } from '../../../lib/region/movement.ts';
import { rankRegion } from '../../../lib/region/rank-stations.ts';
import type { Ranking } from '../../../lib/region/ranking-types.ts';
import { basisOf, constant, station, YEAR_START } from './region-fixtures.ts';

/** A ranking of straight lines: the slope of each station by its code; null is a station without years. */
function rankingBy(slopes: Record<string, number | null>): Ranking {
  const stations = Object.entries(slopes).map(([code, slope]) =>
    station(code, { first: 1980, values: slope === null ? [] : constant(30).map((_, i) => 100 + slope * i) }),
  );
  return rankRegion(stations, basisOf({ period: [1980, 2009] }), YEAR_START);
}

test('rankingMovement: the same ranking moves nobody', () => {
  const ranking = rankingBy({ A: -2, B: -1, C: 1 });
  const { tau, movedFar, medianMove, movements, rankedBoth } = rankingMovement(ranking, ranking);
  expect([tau, movedFar, medianMove, rankedBoth]).toEqual([1, 0, 0, 3]);
  expect(movements.map(({ moved }) => moved)).toEqual([0, 0, 0]);
});

test('rankingMovement: places moved up are above 0, furthest first, equals by code', () => {
  const movement = rankingMovement(rankingBy({ A: -3, B: -2, C: -1, D: 1 }), rankingBy({ A: -3, B: 1, C: -2, D: -1 }));
  // places before A1 B2 C3 D4, after A1 B4 C2 D3
  expect(movement.movements.map(({ code, moved }) => [code, moved])).toEqual([
    ['B', -2],
    ['C', 1],
    ['D', 1],
    ['A', 0],
  ]);
  // of the 6 pairs B–C and B–D turn round
  expect(movement.tau).toBeCloseTo(2 / 6, 12);
  expect(movement.medianMove).toBe(1);
  expect([movement.fallingBefore, movement.fallingAfter, movement.risingBefore, movement.risingAfter]).toEqual([
    3, 3, 1, 1,
  ]);
});

test('rankingMovement: a station that is ranked in one only stands last, and moves nobody else', () => {
  const { rankedBefore, rankedAfter, rankedBoth, movements, tau } = rankingMovement(
    rankingBy({ A: -3, B: -2, C: -1 }),
    rankingBy({ A: null, B: -2, C: -1 }),
  );
  expect([rankedBefore, rankedAfter, rankedBoth, tau]).toEqual([3, 2, 2, 1]);
  expect(movements.map(({ code, before, after, moved }) => [code, before, after, moved])).toEqual([
    ['B', 2, 1, 0],
    ['C', 3, 2, 0],
    ['A', 1, null, null],
  ]);
});

test('rankingMovement: far is further than a tenth of the stations ranked in both, not that far itself', () => {
  const codes = Array.from({ length: 20 }, (_, i) => `S${String(i).padStart(2, '0')}`);
  const before = rankingBy(Object.fromEntries(codes.map((code, i) => [code, i])));
  const swapped = (distance: number) => {
    const slopes = codes.map((_, i) => i);
    [slopes[0], slopes[distance]] = [distance, 0];
    return rankingBy(Object.fromEntries(codes.map((code, i) => [code, slopes[i]])));
  };
  expect(rankingMovement(before, swapped(2)).movedFar).toBe(0);
  expect(rankingMovement(before, swapped(3)).movedFar).toBe(2);
});

test('rankingMovement: of no stations and of one there is no tau', () => {
  const none = rankingMovement(rankingBy({}), rankingBy({}));
  expect([none.tau, none.medianMove, none.movements]).toEqual([null, null, []]);
  expect(rankingMovement(rankingBy({ A: 1 }), rankingBy({ A: -1 }))).toMatchObject({ tau: null, medianMove: 0 });
});
