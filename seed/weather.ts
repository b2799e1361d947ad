import { dateOfDay, dayNumber } from '../lib/calendar/day.ts';
import { randomStream } from './random.ts';

/** Daily weather shared by the whole region. */
export interface Weather {
  /** day number of the first day */
  firstDay: number;
  days: number;
  /** position in the year, 0 to 1 from 1 January, of each day */
  season: Float64Array;
  /** calendar year of each day, with the part of the year gone by */
  time: Float64Array;
  /** mm a day in the south-west, south-east, north-west and north-east */
  rain: Float64Array[];
  /** °C at the mouth */
  temperature: Float64Array;
}

export const WEATHER_CORNERS = 4;

/** Weather from 1 January of the first year to the last day.
 *
 *  Wet and dry days follow one another as a two-state Markov chain whose chances swing with the season (wet winters,
 *  dry summers), with spells of weeks and with good and bad years. Rain on a wet day is a power of an exponential
 *  variate, close to a gamma distribution of shape below 1. The four corners share the spells and differ day by day.
 *  Temperature is a yearly wave with spells on top and warms by a quarter of a degree a decade from 1975 on. */
export function makeWeather(seed: number, firstYear: number, lastDay: number): Weather {
  const firstDay = dayNumber(firstYear, 1, 1);
  const days = lastDay - firstDay + 1;
  const random = randomStream(seed, 'weather');
  const rain = Array.from({ length: WEATHER_CORNERS }, () => new Float64Array(days));
  const [season, time, temperature] = [0, 1, 2].map(() => new Float64Array(days));
  let wet = false;
  let spell = 0;
  let yearly = 0;
  let warmth = 0;
  let year = firstYear;
  let newYear = firstDay;
  let yearDays = 365;
  for (let i = 0; i < days; i += 1) {
    if (i === 0 || firstDay + i === newYear + yearDays) {
      year = dateOfDay(firstDay + i).year;
      newYear = firstDay + i;
      yearDays = dayNumber(year + 1, 1, 1) - newYear;
      yearly = 0.08 * random.normal();
    }
    season[i] = (firstDay + i - newYear) / yearDays;
    time[i] = year + season[i];
    spell = 0.97 * spell + 0.055 * random.normal();
    const mood: number = spell + yearly;
    // Wettest at the turn of the year.
    const winter = Math.cos(2 * Math.PI * (season[i] - 0.02));
    const chance: number = (wet ? 0.66 : 0.27) + 0.09 * winter + 0.14 * mood;
    wet = random.uniform() < chance;
    warmth = 0.86 * warmth + 1.5 * random.normal();
    temperature[i] =
      10.5 - 7 * Math.cos(2 * Math.PI * (season[i] - 0.06)) + warmth + 0.025 * Math.max(0, time[i] - 1975);
    if (!wet) continue;
    const storm = 5.4 * (1 + 0.18 * winter) * Math.exp(0.5 * mood) * random.exponential() ** 1.3;
    for (const corner of rain) corner[i] = storm * Math.exp(0.5 * random.normal() - 0.125);
  }
  return { firstDay, days, season, time, rain, temperature };
}
