import { createHash } from 'node:crypto';
import type { Basis, ResolvedBasis } from '../basis.ts';
import { distanceKm } from '../region/neighbours.ts';
import { WEATHER_QUANTITIES, type WeatherQuantity, type WeatherTrend } from '../region/pair-types.ts';
import { usedYears } from '../region/used-years.ts';
import { quantityWords } from '../series/quantities.ts';
import type { RegionRow } from '../store/regions.ts';
import { recordsOfQuantities } from '../store/station-quantities.ts';
import { minimaOf } from './minima.ts';
import { runTask } from './pool.ts';
import { rankingOf } from './ranking.ts';

/** Half a year: the wet season and what has fallen since. */
const USUAL_ANTECEDENT_DAYS = 180;

/** A weather record that is stored in a region. */
export interface WeatherSource {
  quantity: WeatherQuantity;
  /** where it was measured */
  code: string;
  name: string;
  /** great-circle distance from the station; null when either place is not known */
  km: number | null;
  firstDay: number;
  lastDay: number;
}

export interface WeatherAsked {
  quantity?: WeatherQuantity;
  /** code of the station where it was measured */
  from?: string;
  antecedentDays?: number;
}

export interface WeatherAnswer {
  /** null where the region holds no weather */
  trend: WeatherTrend | null;
  /** every weather record of the region: the station's own first, then the nearest; rainfall before evaporation */
  sources: WeatherSource[];
  basis: ResolvedBasis;
  key: string;
}

/** Thrown for weather that is not there; the message names it and says what is. */
export class WeatherError extends Error {
  override name = 'WeatherError';
}

/** The trend of a station's annual minima given stored weather; null when the region has no such station. Whatever index
 *  the basis names, this is of the minima: they have a date, and so weather before it.
 *  @throws WeatherError when weather is asked for that is not stored */
export async function weatherOf(
  region: Pick<RegionRow, 'id' | 'name'>,
  basis: Basis,
  code: string,
  { quantity, from, antecedentDays = USUAL_ANTECEDENT_DAYS }: WeatherAsked = {},
): Promise<WeatherAnswer | null> {
  const [{ ranking, key }, { stations }] = await Promise.all([rankingOf(region, basis), minimaOf(region, basis)]);
  const here = stations.find(({ station }) => station.code === code);
  if (!here) return null;
  const stored = recordsOfQuantities(region.id, WEATHER_QUANTITIES);
  const placeOf = new Map(stations.map(({ station }) => [station.code, station]));
  const sources = stored
    .map((record) => {
      const place = placeOf.get(record.code);
      return { ...record, km: place ? distanceKm(here.station, place) : null };
    })
    .sort((a, b) => nearness(a, code) - nearness(b, code) || order(a.quantity) - order(b.quantity));
  const shown = sources.map(({ quantity, code, name, km, firstDay, lastDay }) => ({
    ...{ quantity, code, name, km, firstDay, lastDay },
  }));

  const source = sources.find(
    (each) => (quantity === undefined || each.quantity === quantity) && (from === undefined || each.code === from),
  );
  if (!source) {
    if (quantity === undefined && from === undefined) {
      return { trend: null, sources: shown, basis: ranking.basis, key: digest([key, code, 'no weather']) };
    }
    const there = shown.map((each) => `${quantityWords(each.quantity)} at ${each.code}`).join(', ');
    throw new WeatherError(
      `${region.name} holds no ${quantity ? quantityWords(quantity) : 'weather'}${from === undefined ? '' : ` at "${from}"`}; it holds ${there || 'no weather at all'}.`,
    );
  }
  const { years, minima, days } = usedYears(here.minima, ranking.basis.period);
  const { serialCorrection, alpha, period, days: length } = ranking.basis;
  const terms = { days: length, period, serialCorrection, alpha };
  // by what is looked at and not by the key, which knows stations by the numbers that they have in this database
  const seed = digest([terms, code, years, minima, days, source.quantity, source.code, antecedentDays]);
  const { trend, hash } = await runTask('weather', {
    input: {
      station: { code, name: here.station.name },
      minima: { years, minima, days },
      quantity: source.quantity,
      from: { code: source.code, name: source.name },
      antecedentDays,
    },
    weatherOf: { id: source.stationId, unit: source.unit },
    terms,
    seed,
  });
  return { trend, sources: shown, basis: ranking.basis, key: digest([key, seed, hash, stored]) };
}

/** The station's own record is nearest of all; one without a place furthest. */
const nearness = ({ code, km }: { code: string; km: number | null }, here: string): number =>
  code === here ? -1 : Math.min(km ?? Number.MAX_VALUE, Number.MAX_VALUE);

const order = (quantity: WeatherQuantity): number => WEATHER_QUANTITIES.indexOf(quantity);

const digest = (parts: unknown): string =>
  createHash('sha256')
    .update(JSON.stringify(['weather', parts]))
    .digest('hex');
