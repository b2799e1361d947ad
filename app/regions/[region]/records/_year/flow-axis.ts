import { scaleLinear, scaleLog } from 'd3-scale';
import { fixed } from '@/app/components/format';

export type FlowAxisKind = 'log' | 'linear';

export interface FlowAxis {
  /** height of a flow in pixels from the top; flows that a logarithmic axis does not have lie on its floor */
  y(value: number): number;
  ticks: number[];
  /** the least flow that lies on the axis in its own place */
  least: number;
}

/** Levels below a ten-thousandth of the highest are squeezed to the floor of a logarithmic axis: they would press
 *  everything else together. */
const MOST_DECADES = 1e5;

/** @param values  NaN where missing
 *  @param height  pixels from the axis' top to its floor */
export function flowAxis(values: ArrayLike<number>, kind: FlowAxisKind, height: number): FlowAxis {
  let [lowest, highest, leastPositive] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];
  for (let i = 0; i < values.length; i++) {
    const value = values[i];
    if (Number.isNaN(value)) continue;
    lowest = Math.min(lowest, value);
    highest = Math.max(highest, value);
    if (value > 0) leastPositive = Math.min(leastPositive, value);
  }
  const many = Math.max(2, Math.floor(height / 44));
  if (kind === 'log' && highest > 0) {
    const floor = Math.max(leastPositive, highest / MOST_DECADES);
    const scale = scaleLog([floor / 1.15, highest * 1.15], [height, 0]);
    const [least] = scale.domain();
    return {
      y: (value) => (value <= least ? height : scale(value)),
      ticks: spaced(scale.ticks(), scale, many),
      least,
    };
  }
  const [low, high] =
    lowest > highest ? [0, 1] : [Math.min(0, lowest), highest > 0 || lowest < 0 ? Math.max(0, highest) : 1];
  const scale = scaleLinear([low, high], [height, 0]).nice(many);
  return { y: scale, ticks: scale.ticks(many), least: scale.domain()[0] };
}

/** Labels closer than this touch, pixels. */
const LEAST_APART = 16;

/** A logarithmic axis' ticks, at most so many: those that begin with 1, 2 or 5, with 1 or 3, with 1 alone, where these are
 *  two at least and do not touch; else those of all that stand far enough apart. */
function spaced(ticks: number[], scale: (value: number) => number, most: number): number[] {
  const leading = (value: number) => Math.round(value / 10 ** Math.floor(Math.log10(value) + 1e-9));
  for (const digits of [[1, 2, 3, 4, 5, 6, 7, 8, 9], [1, 2, 5], [1, 3], [1]]) {
    const kept = ticks.filter((value) => digits.includes(leading(value)));
    const close = kept.some((value, i) => i > 0 && Math.abs(scale(value) - scale(kept[i - 1])) < LEAST_APART);
    if (kept.length >= 2 && kept.length <= most && !close) return kept;
  }
  const apart = Math.max(LEAST_APART, Math.abs(scale(ticks[0]) - scale(ticks[ticks.length - 1])) / most);
  const kept: number[] = [];
  for (const tick of ticks) {
    const last = kept[kept.length - 1];
    if (last === undefined || Math.abs(scale(tick) - scale(last)) >= apart) kept.push(tick);
  }
  return kept;
}

/** A tick in as few digits as it has. Example: 0.05 → "0.05", 2000 → "2,000" */
export function tickText(tick: number): string {
  const [, decimals = ''] = String(Number(tick.toPrecision(6))).split('.');
  return fixed(tick, decimals.length);
}
