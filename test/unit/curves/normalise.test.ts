import { expect, test } from 'vitest';
import { normaliseCurve } from '../../../lib/curves/normalise.ts';

const curve = { flows: Float64Array.of(9, 3, Number.NaN, 0), mean: 4, median: 2 };
const flowsOf = (result: ReturnType<typeof normaliseCurve>) => (result.ok ? [...result.flows] : result.reason);

test('normaliseCurve by area gives L/s/km²', () => {
  const result = normaliseCurve(curve, { by: 'area', areaKm2: 60 });
  expect(result).toMatchObject({ ok: true, unit: 'L/s/km²' });
  expect(flowsOf(result)).toEqual([150, 50, Number.NaN, 0]);
});

test('normaliseCurve by mean and by median gives ratios', () => {
  expect(flowsOf(normaliseCurve(curve, { by: 'mean', areaKm2: null }))).toEqual([2.25, 0.75, Number.NaN, 0]);
  expect(normaliseCurve(curve, { by: 'median', areaKm2: 60 })).toMatchObject({ ok: true, unit: '1' });
  expect(flowsOf(normaliseCurve(curve, { by: 'median', areaKm2: 60 }))).toEqual([4.5, 1.5, Number.NaN, 0]);
});

test('normaliseCurve by nothing copies the flows', () => {
  const result = normaliseCurve(curve, { by: 'none', areaKm2: null });
  expect(result).toMatchObject({ ok: true, unit: 'm³/s' });
  expect(flowsOf(result)).toEqual([...curve.flows]);
  expect(result.ok && result.flows).not.toBe(curve.flows);
});

test('normaliseCurve says why a station is left out', () => {
  expect(flowsOf(normaliseCurve(curve, { by: 'area', areaKm2: null }))).toContain('no drainage area is known');
  expect(flowsOf(normaliseCurve({ ...curve, median: 0 }, { by: 'median', areaKm2: 60 }))).toBe(
    'the median flow is 0 m³/s: compare by area or as a ratio to the mean flow',
  );
  expect(flowsOf(normaliseCurve({ ...curve, mean: 0 }, { by: 'mean', areaKm2: 60 }))).toBe(
    'the mean flow is 0 m³/s: compare by area',
  );
  const empty = { flows: curve.flows, mean: Number.NaN, median: Number.NaN };
  expect(flowsOf(normaliseCurve(empty, { by: 'median', areaKm2: 60 }))).toBe('no usable year in the period');
});

test.each([0, -5, Number.NaN])('normaliseCurve refuses an area of %d', (areaKm2) => {
  expect(() => normaliseCurve(curve, { by: 'none', areaKm2 })).toThrow(RangeError);
});
