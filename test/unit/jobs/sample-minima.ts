import type { AnnualMinima } from '../../../lib/lowflow/annual-minima-types.ts';

/** Minima as a test gives them, year by year; the rest is plain. */
export function sampleMinima(first: number, minimum: number[], reason: string[] = minimum.map(() => '')): AnnualMinima {
  const count = minimum.length;
  return {
    years: Int32Array.from(minimum, (_, i) => first + i),
    usable: Uint8Array.from(reason, (text) => (text === '' ? 1 : 0)),
    missingDays: Int32Array.from(minimum, (_, i) => i),
    minimum: Float64Array.from(minimum),
    day: Int32Array.from(minimum, (value, i) => (Number.isNaN(value) ? -1 : 10_000 + 365 * i)),
    reason,
    flaggedDays: new Int32Array(count).fill(2),
    zeroDays: new Float64Array(count),
    meanFlow: new Float64Array(count).fill(3.5),
  };
}
