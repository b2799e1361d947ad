import { expect, test } from 'vitest';
import { senSlope } from '../../../lib/statistics/sen-slope.ts';
import { slopeRanks } from '../../../lib/statistics/slope-ranks.ts';
import { seeded } from '../../seeded.ts';

/** Series over the same years, one entry a year, NaN in the gaps; of several shapes, so that what was expected is missed. */
function shapes(length: number, present: readonly number[], random: () => number): Float64Array[] {
  const made = [
    (i: number) => random() + 0 * i,
    (i: number) => Math.exp(8 * random()) + 0 * i,
    (i: number) => Math.round(3 * random()) - i,
    (i: number) => (i % 9 === 0 ? 1e6 : random()),
    () => 5,
    (i: number) => 1e9 + i * 1e-3 * random(),
    (i: number) => (i < length / 2 ? 0 : 1),
  ];
  return made.map((valueAt) => {
    const x = new Float64Array(length).fill(Number.NaN);
    for (const i of present) x[i] = valueAt(i);
    return x;
  });
}

function sortedSlopes(x: Float64Array): number[] {
  const slopes: number[] = [];
  for (let i = 0; i < x.length; i++) {
    for (let j = i + 1; j < x.length; j++) slopes.push((x[j] - x[i]) * (1 / (j - i)));
  }
  return slopes.filter((slope) => !Number.isNaN(slope)).sort((a, b) => a - b);
}

test('slopeRanks.find reads the slopes that sorting would put there, of any series in any order', () => {
  const random = seeded(11);
  for (const length of [2, 3, 5, 24, 61]) {
    const present = Array.from({ length }, (_, i) => i).filter((i) => i === 0 || i === length - 1 || random() < 0.8);
    const pairs = (present.length * (present.length - 1)) / 2;
    for (const wanted of [[0], [pairs - 1], [pairs >> 1], [0, pairs >> 2, pairs >> 1, pairs - 1]]) {
      const ranks = [...new Set(wanted)];
      const found = slopeRanks(length, present, ranks);
      expect(found.pairs).toBe(pairs);
      const out = new Float64Array(ranks.length);
      for (let round = 0; round < 3; round++) {
        for (const x of shapes(length, present, random)) {
          const before = x.slice();
          found.find(x, out);
          const sorted = sortedSlopes(x);
          expect(Array.from(out)).toEqual(ranks.map((rank) => sorted[rank]));
          expect(x).toEqual(before);
        }
      }
    }
  }
});

test('slopeRanks agrees with senSlope on the median', () => {
  const x = Float64Array.from({ length: 40 }, (_, i) => Math.sin(i) + 0.02 * i);
  x[7] = Number.NaN;
  const present = Array.from({ length: 40 }, (_, i) => i).filter((i) => i !== 7);
  const pairs = (39 * 38) / 2;
  const out = new Float64Array(1);
  slopeRanks(40, present, [(pairs - 1) / 2]).find(x, out);
  expect(out[0]).toBeCloseTo(
    senSlope(
      Array.from({ length: 40 }, (_, i) => i),
      x,
    ).slope,
    14,
  );
});

test('slopeRanks refuses places and ranks that are none', () => {
  expect(() => slopeRanks(3, [1], [0])).toThrow('present must name at least 2 places, got 1');
  expect(() => slopeRanks(3, [0, 3], [0])).toThrow('present must rise within 0..2, got 3 at place 1');
  expect(() => slopeRanks(3, [1, 1], [0])).toThrow(RangeError);
  expect(() => slopeRanks(3, [0, 1, 2], [3])).toThrow('ranks must rise within 0..2, got 3 at place 0');
  expect(() => slopeRanks(3, [0, 1, 2], [1, 0])).toThrow('got 0 at place 1');
  expect(() => slopeRanks(3, [0, 1, 2], [])).toThrow('at least one rank');
});
