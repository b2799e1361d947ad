import { expect, test } from 'vitest';
import { movementWords } from '@/app/regions/[region]/_certainty/movement-words';
import type { RankingMovement } from '@/lib/region/window-types';

const movement = (given: Partial<RankingMovement>): RankingMovement => ({
  rankedBefore: 33,
  rankedAfter: 33,
  rankedBoth: 33,
  tau: 0.8,
  movedFar: 5,
  medianMove: 1,
  fallingBefore: 3,
  fallingAfter: 4,
  risingBefore: 0,
  risingAfter: 0,
  movements: [],
  ...given,
});
const moved = (places: number | null) => ({
  code: 'a',
  name: 'Ambry at Sallow',
  before: 12,
  after: 3,
  moved: places,
  trendBefore: null,
  trendAfter: null,
});

test.each<[string, Partial<RankingMovement>, string]>([
  [
    'who moved furthest and how many keep',
    { movements: [moved(9)] },
    'Against the region’s own terms, 28 of 33 stations ranked in both keep within a tenth of the places; Ambry at Sallow moved furthest, 9 places up.',
  ],
  [
    'a fall by one place',
    { movements: [moved(-1)], movedFar: 32 },
    'Against the region’s own terms, 1 of 33 stations ranked in both keeps within a tenth of the places; Ambry at Sallow moved furthest, 1 place down.',
  ],
  [
    'that nobody moved',
    { movements: [moved(0)], movedFar: 0 },
    'Against the region’s own terms, all 33 stations ranked in both keep their places.',
  ],
  [
    'that one station keeps its place',
    { rankedBoth: 1, movedFar: 0, movements: [moved(0)] },
    'Against the region’s own terms, the one station ranked in both keeps its place.',
  ],
  [
    'that there is nothing to compare',
    { rankedBoth: 0, movedFar: 0, movements: [moved(null)] },
    'No station is ranked both on these and on the region’s own terms.',
  ],
])('movementWords says %s', (_, given, text) => {
  expect(movementWords(movement(given))).toBe(text);
});
