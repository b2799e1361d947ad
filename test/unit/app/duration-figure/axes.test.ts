import { describe, expect, test } from 'vitest';
import {
  exceedanceDomain,
  exceedancePosition,
  exceedanceTicks,
  flowScale,
} from '@/app/components/duration-figure/axes';

describe('exceedancePosition', () => {
  test('is the exceedance itself on a linear axis', () => {
    expect(exceedancePosition(0.25, 'linear')).toBe(0.25);
  });

  test('is the standard normal quantile on a probability axis (0.975 → 1.96, from any table of the normal law)', () => {
    expect(exceedancePosition(0.975, 'normal')).toBeCloseTo(1.959964, 6);
    expect(exceedancePosition(0.5, 'normal')).toBeCloseTo(0, 12);
  });

  test.each(['linear', 'normal'] as const)('every tick of the %s axis lies on the axis', (axis) => {
    const [low, high] = exceedanceDomain(axis);
    for (const sparse of [false, true]) {
      for (const { at } of exceedanceTicks(axis, sparse)) {
        expect(at).toBeGreaterThanOrEqual(low);
        expect(at).toBeLessThanOrEqual(high);
      }
    }
  });

  test('a narrow figure has fewer ticks', () => {
    expect(exceedanceTicks('normal', true).length).toBeLessThan(exceedanceTicks('normal', false).length);
    expect(exceedanceTicks('linear', true).map((tick) => tick.value)).toEqual([0, 0.2, 0.4, 0.6, 0.8, 1]);
  });
});

describe('flowScale, logarithmic', () => {
  test('ends at 1, 2 or 5 times a power of ten around the flows', () => {
    const scale = flowScale([0.3, 7, 42], 'log');
    expect(scale.domain[0]).toBeCloseTo(Math.log10(0.2), 12);
    expect(scale.domain[1]).toBeCloseTo(Math.log10(50), 12);
  });

  test('an exact end is not pushed outwards', () => {
    const { domain } = flowScale([1, 1000], 'log');
    expect(domain[0]).toBeCloseTo(0, 12);
    expect(domain[1]).toBeCloseTo(3, 12);
  });

  test('without zeros there is no place for them', () => {
    const scale = flowScale([1, 10], 'log');
    expect(scale.zeroAt).toBeNull();
    expect(scale.breakAt).toBeNull();
  });

  test('zeros stand below the lowest flow, under a break, with a tick that says 0', () => {
    const scale = flowScale([0, 1, 10], 'log');
    expect(scale.position(0)).toBe(scale.zeroAt);
    expect(scale.zeroAt).toBeLessThan(scale.breakAt as number);
    expect(scale.breakAt).toBeLessThan(scale.position(1) as number);
    expect(scale.domain[0]).toBeLessThan(scale.zeroAt as number);
    expect(scale.ticks[0]).toEqual({ at: scale.zeroAt, value: 0 });
  });

  test('missing flows have no position and do not move the axis', () => {
    const scale = flowScale([null, 1, 10], 'log');
    expect(scale.position(null)).toBeNull();
    expect(scale.position(Number.NaN)).toBeNull();
    expect(scale.domain).toEqual(flowScale([1, 10], 'log').domain);
  });

  test('2 and 5 carry their value while there is room, and are bare grid lines over many decades', () => {
    expect(flowScale([1, 10], 'log').ticks.map((tick) => tick.value)).toEqual([1, 2, 5, 10]);
    const wide = flowScale([0.001, 1000], 'log').ticks;
    expect(wide.filter((tick) => tick.value !== null).map((tick) => tick.value)).toEqual([
      0.001, 0.01, 0.1, 1, 10, 100, 1000,
    ]);
    expect(wide.length).toBeGreaterThan(7);
  });

  test.each([
    ['nothing at all', []],
    ['only missing flows', [null, null]],
    ['only zeros', [0, 0]],
    ['one flow', [3]],
  ])('%s still makes an axis with a length', (_, flows) => {
    const { domain, ticks } = flowScale(flows, 'log');
    expect(domain[1]).toBeGreaterThan(domain[0]);
    expect(ticks.length).toBeGreaterThan(1);
  });
});

describe('flowScale, linear', () => {
  test('runs from 0 to a round number above the highest flow', () => {
    const scale = flowScale([3, 47], 'linear');
    expect(scale.domain).toEqual([0, 50]);
    expect(scale.ticks.map((tick) => tick.value)).toEqual([0, 10, 20, 30, 40, 50]);
  });

  test('has ticks without binary tails', () => {
    expect(flowScale([0.29], 'linear').ticks.map((tick) => tick.value)).toEqual([0, 0.1, 0.2, 0.3]);
  });

  test('zeros are ordinary values', () => {
    expect(flowScale([0, 1], 'linear').position(0)).toBe(0);
  });

  test('all zero still makes an axis with a length', () => {
    expect(flowScale([0, 0], 'linear').domain[1]).toBeGreaterThan(0);
  });
});
