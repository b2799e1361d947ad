import { expect, test } from 'vitest';
import { lowess } from '../../lib/statistics/lowess.ts';
import { expectReference, referenceCases } from './reference.ts';

type Input = { x: number[]; y: number[]; span: number; rounds: number };

for (const reference of referenceCases<Input, object>('lowess')) {
  test(`lowess gives the curve of ${reference.name}`, () => {
    const { x, y, span, rounds } = reference.input;
    expectReference(reference, { curve: lowess(x, y, { span, rounds }) });
  });
}

test('lowess takes a span of two thirds and three rounds where none are named', () => {
  const [first] = referenceCases<Input, object>('lowess');
  expect(first.input).toMatchObject({ rounds: 3, span: 2 / 3 });
  expectReference(first, { curve: lowess(first.input.x, first.input.y) });
});
