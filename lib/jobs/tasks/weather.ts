import type { WeatherTrend } from '../../region/pair-types.ts';
import { type WeatherInput, type WeatherTerms, weatherTrend } from '../../region/weather-trend.ts';
import { toShownUnit, type Unit } from '../../series/quantities.ts';
import { usableFlow } from '../../series/usable-flow.ts';
import { readSeries } from '../../store/records.ts';

/** Trend of a station's minima given the weather that was measured at a station, its own or another.
 *  @param task.weatherOf  id of that station, and the unit of its record
 *  @returns `hash`: of the weather's record as read, null without one */
export function weather(task: {
  input: Omit<WeatherInput, 'weather'>;
  weatherOf: { id: number; unit: Unit };
  terms: WeatherTerms;
  seed: string;
}): { trend: WeatherTrend; hash: string | null } {
  const { input, weatherOf, terms, seed } = task;
  const { quantity } = input;
  let days = { firstDay: 0, values: new Float64Array() };
  let readHash: string | null = null;
  readSeries(
    [weatherOf.id],
    (_, series, hash) => {
      readHash = hash;
      const factor = toShownUnit(quantity, weatherOf.unit, null);
      // flags of the basis speak of flows: only what a person rejected is left out
      days = { firstDay: series.firstDay, values: usableFlow(series, []).map((depth) => depth * factor) };
    },
    { quantity },
  );
  return { trend: weatherTrend({ ...input, weather: days }, terms, seed), hash: readHash };
}
