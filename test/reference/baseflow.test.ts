import { expect, test } from 'vitest';
import { smoothedMinimaBaseflow, turningPoints } from '../../lib/lowflow/baseflow.ts';
import { expectReference, referenceCase } from './reference.ts';

interface Input {
  x: number[];
}
interface Expected {
  BFI: number;
  index: number[];
}

const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0);

function baseflowOf(x: number[]) {
  const flow = Float64Array.from(x);
  const base = smoothedMinimaBaseflow(flow);
  const known = x.map((_, i) => i).filter((i) => !Number.isNaN(base[i]));
  return { flow, base, known, BFI: sum(known.map((i) => base[i])) / sum(known.map((i) => x[i])) };
}

for (const name of ['smoothed minima: daily-2yr', 'smoothed minima: daily-3yr']) {
  test(`smoothedMinimaBaseflow gives turning points, baseflow and index of ${name}`, () => {
    const reference = referenceCase<Input, Expected>('baseflow', name);
    const { flow, base, known, BFI } = baseflowOf(reference.input.x);
    const points = turningPoints(flow);
    expectReference(reference, {
      BFI,
      n_turning_points: points.length,
      turning_point_index: points,
      turning_point_flow: points.map((i) => flow[i]),
      baseflow_at_index: reference.expected.index.map((i) => base[i]),
    });
    expect([known[0], known[known.length - 1]]).toEqual([points[0], points[points.length - 1]]);
  });
}

test('smoothedMinimaBaseflow of a constant flow is that flow between the first and the last turning point', () => {
  const reference = referenceCase<Input, Expected>('baseflow', 'smoothed minima, constant flow');
  const { known, BFI } = baseflowOf(reference.input.x);
  expectReference(reference, { BFI, first_turning_point: known[0], last_turning_point: known[known.length - 1] });
});

test('smoothedMinimaBaseflow has no turning point where zeros stand beside zeros, and so no baseflow', () => {
  const reference = referenceCase<Input, Expected>('baseflow', 'smoothed minima, zero flows');
  const { flow, known } = baseflowOf(reference.input.x);
  expectReference(reference, { turning_point_blocks: turningPoints(flow) });
  expect(known).toEqual([]);
});
