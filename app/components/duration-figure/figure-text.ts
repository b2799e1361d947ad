import { fixed } from '../format.ts';

/** 0.05 → "5", 0.999 → "99.9": an exceedance as percent without binary tails. */
export function exceedanceText(exceedance: number): string {
  return String(Number((exceedance * 100).toFixed(4)));
}

/** A round number on an axis, as short as it is: 5, 0.02, 2,000. */
export function tickText(value: number): string {
  return Math.abs(value) >= 1000 ? fixed(value) : String(value);
}
