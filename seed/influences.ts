import { annualMinima } from '../lib/lowflow/annual-minima.ts';
import type { Weather } from './weather.ts';

/** What people and rock do to a river's flow. Each changes the flow in place, m³/s, day by day of the weather. */

/** Ordinary low water: the given share of the years has a smaller 7-day minimum. */
export function lowWater(weather: Weather, flow: Float64Array, share: number, fromDay = weather.firstDay): number {
  const series = { firstDay: weather.firstDay, values: flow, flags: new Uint8Array(flow.length) };
  const { years, usable, minimum, day } = annualMinima(series, {
    yearStart: 2,
    season: null,
    days: 7,
    maxMissingDays: 0,
    exclude: [],
  });
  const minima = minimum.filter((_, i) => usable[i] === 1 && day[i] >= fromDay);
  return minima.length === 0 || years.length === 0 ? 0 : minima.sort()[Math.floor(share * minima.length)];
}

/** A reservoir that holds a quarter of a year's flow, fills in winter and gives an even release in summer. */
export function dam(weather: Weather, flow: Float64Array, fromYear: number): void {
  const mean = flow.reduce((sum, each) => sum + each, 0) / flow.length;
  const capacity = 90 * mean;
  let stored = 0.6 * capacity;
  for (let i = 0; i < flow.length; i += 1) {
    if (weather.time[i] < fromYear) continue;
    stored += flow[i];
    const release = Math.min(stored, 0.42 * mean + 0.25 * flow[i]);
    stored -= release;
    const spill = Math.max(0, stored - capacity);
    stored -= spill;
    flow[i] = release + spill;
  }
}

/** Water taken out: from nothing in `fromYear` to `share` of ordinary low water 35 years later, half as much again in
 *  summer, and never the last fifth of the flow. */
export function abstraction(weather: Weather, flow: Float64Array, fromYear: number, share: number): void {
  const ordinary = lowWater(weather, flow, 0.5);
  for (let i = 0; i < flow.length; i += 1) {
    const grown = Math.min(1, (weather.time[i] - fromYear) / 35);
    if (grown <= 0) continue;
    const summer = 1 - 0.5 * Math.cos(2 * Math.PI * weather.season[i]);
    flow[i] = Math.max(0.2 * flow[i], flow[i] - share * ordinary * grown * summer);
  }
}

/** Water that a growing town brings in from elsewhere and lets go: up to `share` of ordinary low water. */
export function returnFlow(weather: Weather, flow: Float64Array, fromYear: number, share: number): void {
  const ordinary = lowWater(weather, flow, 0.5);
  for (let i = 0; i < flow.length; i += 1) {
    flow[i] += share * ordinary * Math.min(1, Math.max(0, (weather.time[i] - fromYear) / 45));
  }
}

/** A bed that swallows as much as falls short in `dryShare` of the years since `fromDay`. */
export function seepage(weather: Weather, flow: Float64Array, dryShare: number, fromDay: number): void {
  const loss = lowWater(weather, flow, dryShare, fromDay);
  for (let i = 0; i < flow.length; i += 1) flow[i] = Math.max(0, flow[i] - loss);
}
