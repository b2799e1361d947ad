import fc from 'fast-check';
import { expect, test } from 'vitest';
import { spreadLabels } from '@/app/components/duration-figure/spread-labels';

test('labels that do not touch stay where they are wanted', () => {
  expect(spreadLabels([70, 10, 40], 10, [0, 100])).toEqual([70, 10, 40]);
});

test('two that touch move apart by the same amount', () => {
  expect(spreadLabels([10, 12], 10, [0, 100])).toEqual([6, 16]);
});

test('labels just one height apart do not move; a little closer, they do', () => {
  expect(spreadLabels([20, 30], 10, [0, 100])).toEqual([20, 30]);
  expect(spreadLabels([20, 29], 10, [0, 100])).toEqual([19.5, 29.5]);
});

test('equal wishes keep the order in which they were given', () => {
  expect(spreadLabels([50, 50, 50], 10, [0, 100])).toEqual([40, 50, 60]);
});

test('a label wanted outside is brought inside, with its half height', () => {
  expect(spreadLabels([-20], 10, [0, 100])).toEqual([5]);
  expect(spreadLabels([140], 10, [0, 100])).toEqual([95]);
});

test('too many for the room are spread evenly over it', () => {
  const centres = spreadLabels(new Array(21).fill(50), 10, [0, 110]);
  expect(centres[0]).toBeCloseTo(5, 9);
  expect(centres[20]).toBeCloseTo(105, 9);
});

test('no labels: no places', () => {
  expect(spreadLabels([], 10, [0, 100])).toEqual([]);
});

test('whatever is wanted: none covers another, all lie inside, order is kept, the wishes are left unchanged', () => {
  fc.assert(
    fc.property(fc.array(fc.double({ min: -50, max: 450, noNaN: true }), { maxLength: 20 }), (wanted) => {
      const copy = [...wanted];
      const centres = spreadLabels(wanted, 17, [0, 400]);
      expect(wanted).toEqual(copy);
      const order = wanted.map((_, index) => index).sort((a, b) => wanted[a] - wanted[b] || a - b);
      const sorted = order.map((index) => centres[index]);
      for (let index = 1; index < sorted.length; index++) {
        expect(sorted[index] - sorted[index - 1]).toBeGreaterThanOrEqual(17 - 1e-6);
      }
      for (const centre of centres) {
        expect(centre).toBeGreaterThanOrEqual(8.5 - 1e-6);
        expect(centre).toBeLessThanOrEqual(391.5 + 1e-6);
      }
    }),
    { seed: 7 },
  );
});
