import { describe, expect, test } from 'vitest';
import { beyondChance } from '../../../lib/region/beyond-chance.ts';

describe('beyondChance', () => {
  test('gives bound, mean and p of a small case by hand', () => {
    // P(count ≤ 1) = 3/4, so 95 % need 3; two of the four are at least 1
    expect(beyondChance(Uint32Array.of(0, 0, 1, 3), 1)).toEqual({ count: 1, bound: 3, expected: 1, p: 3 / 5 });
  });

  test('takes the smallest count that 95 of 100 replicates do not exceed', () => {
    const counts = (zeros: number) => Uint32Array.from({ length: 100 }, (_, i) => (i < zeros ? 0 : 7));
    expect(beyondChance(counts(95), 0).bound).toBe(0);
    expect(beyondChance(counts(94), 0).bound).toBe(7);
    expect(beyondChance(counts(100), 3)).toEqual({ count: 3, bound: 0, expected: 0, p: 1 / 101 });
  });

  test('gives p 1 where nothing was found', () => {
    expect(beyondChance(Uint32Array.of(0, 2), 0).p).toBe(1);
  });

  test('refuses to tell chance from no replicate', () => {
    expect(() => beyondChance(new Uint32Array(), 1)).toThrow('beyondChance: byChance must hold at least one count');
  });
});
