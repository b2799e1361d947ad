import { expect, test } from 'vitest';
import { chunksOf } from '../../../lib/jobs/share-out.ts';

test('chunksOf keeps order and loses nothing, below, at and above a whole number of chunks', () => {
  expect(chunksOf([], 3)).toEqual([]);
  expect(chunksOf([1, 2], 3)).toEqual([[1, 2]]);
  expect(chunksOf([1, 2, 3], 3)).toEqual([[1, 2, 3]]);
  expect(chunksOf([1, 2, 3, 4], 3)).toEqual([[1, 2, 3], [4]]);
});
