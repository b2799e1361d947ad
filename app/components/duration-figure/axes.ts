/** Where exceedances and flows stand on a duration figure. The figure's own scales stay linear: values are moved here
 *  first, so that a probability axis, a logarithmic axis and the place for zeros are all in one file. */
import { normalQuantile } from '@/lib/statistics/normal';

export type ExceedanceAxis = 'linear' | 'normal';
export type FlowAxis = 'log' | 'linear';

export interface AxisTick {
  /** position on the linear scale of the figure */
  at: number;
  /** the value printed there; null for a grid line without a label */
  value: number | null;
}

/** The exceedances that people read a duration curve at: the rows of its table. */
export const NAMED_EXCEEDANCES = [0.05, 0.1, 0.25, 0.5, 0.75, 0.9, 0.95, 0.99] as const;

const LINEAR_TICKS = [0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 1];
const NORMAL_TICKS = [0.001, 0.01, 0.05, 0.1, 0.2, 0.3, 0.5, 0.7, 0.8, 0.9, 0.95, 0.99, 0.999];
/** For narrow screens, where thirteen labels would touch. */
const SPARSE_NORMAL_TICKS = [0.001, 0.05, 0.25, 0.5, 0.75, 0.95, 0.999];

/** Position of an exceedance (0 to 1): itself, or its standard normal quantile. */
export function exceedancePosition(exceedance: number, axis: ExceedanceAxis): number {
  return axis === 'linear' ? exceedance : normalQuantile(exceedance);
}

export function exceedanceDomain(axis: ExceedanceAxis): [number, number] {
  return axis === 'linear' ? [0, 1] : [normalQuantile(0.001), normalQuantile(0.999)];
}

export function exceedanceTicks(axis: ExceedanceAxis, sparse: boolean): AxisTick[] {
  const values =
    axis === 'linear'
      ? LINEAR_TICKS.filter((_, index) => !sparse || index % 2 === 0)
      : sparse
        ? SPARSE_NORMAL_TICKS
        : NORMAL_TICKS;
  return values.map((value) => ({ at: exceedancePosition(value, axis), value }));
}

/** The flow axis: how a flow is placed, which ticks it has and, on a logarithmic axis, where zeros stand. */
export interface FlowScale {
  domain: [number, number];
  ticks: AxisTick[];
  /** null for a missing flow; zeros of a logarithmic axis stand at `zeroAt` */
  position(flow: number | null): number | null;
  /** where zeros stand below the axis break; null when the axis has none */
  zeroAt: number | null;
  /** where the break is drawn, between `zeroAt` and the lowest flow */
  breakAt: number | null;
}

/** Scales for the flows that are shown.
 *  @param flows  any order; null is missing. Nothing positive on a logarithmic axis: it runs from 0.1 to 1. */
export function flowScale(flows: Iterable<number | null>, axis: FlowAxis): FlowScale {
  let low = Number.POSITIVE_INFINITY;
  let high = 0;
  let zeros = false;
  for (const flow of flows) {
    if (flow === null || !Number.isFinite(flow)) continue;
    if (flow <= 0) zeros = true;
    else low = Math.min(low, flow);
    high = Math.max(high, flow);
  }
  return axis === 'linear' ? linearScale(high) : logScale(low, high, zeros);
}

function linearScale(high: number): FlowScale {
  const top = high > 0 ? high : 1;
  const step = niceStep(top / 5);
  const count = Math.ceil(top / step - 1e-9);
  const ticks = Array.from({ length: count + 1 }, (_, index) => ({
    at: Number((index * step).toPrecision(12)),
    value: Number((index * step).toPrecision(12)),
  }));
  return {
    domain: [0, ticks[count].at],
    ticks,
    position: (flow) => (flow === null || !Number.isFinite(flow) ? null : flow),
    zeroAt: null,
    breakAt: null,
  };
}

/** 1, 2 or 5 times a power of ten, at least `least`. */
function niceStep(least: number): number {
  const power = 10 ** Math.floor(Math.log10(least));
  const factor = [1, 2, 5, 10].find((candidate) => candidate * power >= least * (1 - 1e-9)) ?? 10;
  return factor * power;
}

function logScale(lowest: number, highest: number, zeros: boolean): FlowScale {
  const anything = Number.isFinite(lowest);
  const low = logFloor(anything ? lowest : 0.1);
  const high = Math.max(logCeil(anything ? highest : 1), low + Math.log10(2));
  const span = high - low;
  // Zeros get a tenth of the height to themselves, so that nobody takes them for a small flow.
  const zeroAt = zeros ? low - span * 0.1 : null;
  return {
    domain: [zeroAt === null ? low : zeroAt - span * 0.03, high],
    ticks: [...(zeroAt === null ? [] : [{ at: zeroAt, value: 0 }]), ...logTicks(low, high)],
    position: (flow) => {
      if (flow === null || !Number.isFinite(flow)) return null;
      return flow > 0 ? Math.log10(flow) : zeroAt;
    },
    zeroAt,
    breakAt: zeroAt === null ? null : low - span * 0.05,
  };
}

/** log10 of the largest 1, 2 or 5 × 10^k that is not above `value`. */
function logFloor(value: number): number {
  const power = Math.floor(Math.log10(value) + 1e-12);
  const factor = [5, 2, 1].find((candidate) => candidate * 10 ** power <= value * (1 + 1e-9)) ?? 1;
  return Math.log10(factor) + power;
}

function logCeil(value: number): number {
  const power = Math.floor(Math.log10(value) + 1e-12);
  const factor = [1, 2, 5, 10].find((candidate) => candidate * 10 ** power >= value * (1 - 1e-9)) ?? 10;
  return Math.log10(factor) + power;
}

/** Every power of ten carries its value; 2 and 5 do while there is room, and are plain grid lines otherwise. */
function logTicks(low: number, high: number): AxisTick[] {
  const roomy = high - low <= 2.5;
  const ticks: AxisTick[] = [];
  for (let power = Math.floor(low - 1e-9); power <= Math.ceil(high); power++) {
    for (const factor of [1, 2, 5]) {
      const at = power + Math.log10(factor);
      if (at < low - 1e-9 || at > high + 1e-9) continue;
      const value = Number((factor * 10 ** power).toPrecision(6));
      ticks.push({ at, value: factor === 1 || roomy ? value : null });
    }
  }
  return ticks;
}
