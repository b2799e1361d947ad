import type { RandomStream } from './random.ts';
import { WEATHER_CORNERS, type Weather } from './weather.ts';

/** How a piece of land turns weather into flow. */
export interface Catchment {
  /** weight of each weather corner, in all 1 */
  corners: readonly number[];
  /** rain here over rain at the corners */
  rainFactor: number;
  /** °C below the mouth's temperature */
  cooler: number;
  /** water that the soil can hold, mm */
  soilMm: number;
  /** share of what the soil lets go that takes the slow way, 0 to 1 */
  slowShare: number;
  /** mean days of stay in the fast and in the slow store */
  fastDays: number;
  slowDays: number;
  /** change of what reaches the slow store, share per decade from 1975 on */
  rechargeTrend: number;
}

const TREND_FROM = 1975;

/** Daily runoff in mm: snow by degree-days, soil that lets go the more the wetter it is, and two linear reservoirs
 *  beside each other, one fast and one slow. */
export function runoffOf(weather: Weather, land: Catchment, random: RandomStream): Float64Array {
  const { days, rain, temperature, season, time } = weather;
  const runoff = new Float64Array(days);
  const [fastRate, slowRate] = [1 / land.fastDays, 1 / land.slowDays];
  let snow = 0;
  let soil = land.soilMm * 0.7;
  let fast = 5;
  let slow = 0.6 * land.slowDays;
  for (let i = 0; i < days; i += 1) {
    let water = 0;
    for (let k = 0; k < WEATHER_CORNERS; k += 1) water += land.corners[k] * rain[k][i];
    // Showers differ from valley to valley.
    if (water > 0) water *= land.rainFactor * (0.7 + 0.6 * random.uniform());
    const degrees = temperature[i] - land.cooler;
    if (degrees < 0.5) {
      snow += water;
      water = 0;
    } else if (snow > 0) {
      const melt = Math.min(snow, 3 * (degrees - 0.5));
      snow -= melt;
      water += melt;
    }
    const wetness = soil / land.soilMm;
    const daylight = 1 - 0.6 * Math.cos(2 * Math.PI * (season[i] + 0.03));
    const thirst = degrees > 0 ? 0.14 * degrees * daylight : 0;
    const released = water * wetness * wetness;
    soil += water - released - thirst * Math.min(1, 1.4 * wetness);
    const overflow = soil > land.soilMm ? soil - land.soilMm : 0;
    soil = soil < 0 ? 0 : soil - overflow;
    const decades = time[i] > TREND_FROM ? (time[i] - TREND_FROM) / 10 : 0;
    const seeping = (released + overflow) * land.slowShare;
    slow += seeping * (1 + land.rechargeTrend * decades);
    fast += released + overflow - seeping;
    runoff[i] = fast * fastRate + slow * slowRate;
    fast -= fast * fastRate;
    slow -= slow * slowRate;
  }
  return runoff;
}
