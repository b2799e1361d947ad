import { expect } from 'vitest';
import { GET as alternatives } from '../../../app/api/regions/[region]/alternatives/route.ts';
import { GET as breaks } from '../../../app/api/regions/[region]/breaks/route.ts';
import { GET as certainty } from '../../../app/api/regions/[region]/certainty/route.ts';
import { GET as movement } from '../../../app/api/regions/[region]/movement/route.ts';
import { GET as ranking } from '../../../app/api/regions/[region]/ranking/route.ts';
import { GET as regional } from '../../../app/api/regions/[region]/regional/route.ts';
import { GET as startEnd } from '../../../app/api/regions/[region]/start-end/route.ts';
import { GET as stationBreaks } from '../../../app/api/regions/[region]/stations/[code]/breaks/route.ts';
import { GET as pair } from '../../../app/api/regions/[region]/stations/[code]/pair/route.ts';
import { GET as stationStartEnd } from '../../../app/api/regions/[region]/stations/[code]/start-end/route.ts';
import { GET as weather } from '../../../app/api/regions/[region]/stations/[code]/weather/route.ts';
import { call, problemOf } from '../api/call.ts';

const OF_REGION = { ranking, certainty, regional, 'start-end': startEnd, movement, alternatives, breaks };
const OF_STATION = { 'start-end': stationStartEnd, breaks: stationBreaks, pair, weather };
export const REGION_ROUTES = Object.keys(OF_REGION) as (keyof typeof OF_REGION)[];
export const STATION_ROUTES = Object.keys(OF_STATION) as (keyof typeof OF_STATION)[];

/** What a program writes where it meant a figure or a name. */
const NO_FIGURE = /\bNaN\b|Infinity|\bundefined\b|\[object /;

/** Expects text that holds no figure gone astray. */
export function expectSound(text: string, where: string): void {
  const at = NO_FIGURE.exec(text)?.index ?? -1;
  expect(at === -1 ? '' : `${where}: …${text.slice(Math.max(0, at - 60), at + 60)}…`).toBe('');
}

export const askRegion = (slug: string, route: keyof typeof OF_REGION, query = ''): Promise<Response> =>
  call(OF_REGION[route], `/api/regions/${slug}/${route}${query}`, { region: slug });

export const askStation = (slug: string, code: string, route: keyof typeof OF_STATION, query = ''): Promise<Response> =>
  call(OF_STATION[route], `/api/regions/${slug}/stations/${code}/${route}${query}`, { region: slug, code });

/** Expects an answer: 200, and no figure gone astray. */
export async function soundText(response: Response, where: string): Promise<string> {
  const text = await response.text();
  expect(`${where}: ${response.status === 200 ? 200 : text}`).toBe(`${where}: 200`);
  expectSound(text, where);
  return text;
}

/** Expects a refusal in words, and answers these. */
export async function refusal(response: Response, status = 400): Promise<string> {
  const { detail } = await problemOf(response, status);
  expect(detail.length).toBeGreaterThan(15);
  expect(detail.endsWith('.')).toBe(true);
  return detail;
}
