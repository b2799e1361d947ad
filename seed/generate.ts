/** Makes an invented region of any size: a river basin, its stations and their daily flows.
 *
 *    import { generateRegion } from './generate.ts';
 *    const region = generateRegion({ seed: 1921 });                        // the demo region
 *    const large = generateRegion({ seed: 7, stations: 2000, years: 60 }); // for measuring
 *    for (const record of region.records()) …                             // one at a time, never all in memory
 *
 *  1921 is the seed of the demo region. The same seed gives the same region, value for value. Nothing in it is real:
 *  names, land, weather and flows come out of the seed, and its place is open ocean. */

import { dateOfDay } from '../lib/calendar/day.ts';
import { plantFaults, type SeedBeside, type SeedMark } from './beside.ts';
import { type Catchment, runoffOf } from './catchment-flow.ts';
import { describeStations, type SeedStation } from './describe.ts';
import { type Drainage, layDrainage } from './drainage.ts';
import { BARE, besideOf, type Furnishings, furnish } from './furnish.ts';
import { CELL_KM2 } from './hex-grid.ts';
import { abstraction, dam, returnFlow, seepage } from './influences.ts';
import { drawLayers, type SeedLayer } from './layers.ts';
import { REGION_NAME, riverNames } from './names.ts';
import { fractalNoise, type NoiseField } from './noise.ts';
import { CODES, observe } from './observe.ts';
import { randomStream } from './random.ts';
import { type River, traceRivers } from './rivers.ts';
import { chooseSites, type Site } from './sites.ts';
import { drawTraits, type Traits } from './traits.ts';
import { makeWeather, type Weather } from './weather.ts';

export type { SeedStation };

export const DEMO_SEED = 1921;
export const DEMO_STATIONS = 36;

export interface RegionRequest {
  seed: number;
  /** number of stations; 36 unless said */
  stations?: number;
  /** length of every record in years; 25 to 90 and a short one unless said */
  years?: number;
  /** with what the demo shows beyond flows: levels, weather, a metered abstraction, faults to find */
  furnished?: boolean;
}

/** One station's flows as an archive would hand them out. */
export interface SeedRecord {
  code: string;
  unit: 'm3/s';
  firstDay: number;
  /** NaN = missing */
  values: Float64Array;
  /** index into codeList a day; 255 = no row for this day */
  codes: Uint8Array;
  codeList: { text: string; bits: number }[];
  /** further records that were kept there */
  beside: SeedBeside[];
  /** what people have said of its days */
  marks: SeedMark[];
}

export interface SeedRegion {
  name: string;
  stations: SeedStation[];
  /** each station with the next one below it */
  network: { upstream: string; downstream: string }[];
  furnishings: Furnishings;
  layers(): SeedLayer[];
  /** every record once, upstream before downstream; may be walked again */
  records(): Generator<SeedRecord>;
}

/** Cells of land for each station, and at least: small regions keep finely drawn rivers. */
const CELLS_PER_STATION = 45;
const LEAST_CELLS = 14_000;
/** Cells from which a channel is a river with a name, and from which it is drawn. */
const RIVER_CELLS = 12;
const DRAWN_RIVER_CELLS = 26;
/** Years of weather before the first record, for soil and springs to fill. */
const RUN_IN_YEARS = 3;

/** @throws RangeError when a number is not a whole number in its range: stations 1–20,000, years 1–150 */
export function generateRegion({ seed, stations: count = DEMO_STATIONS, years, furnished }: RegionRequest): SeedRegion {
  checkWhole('seed', seed, -(2 ** 31), 2 ** 31);
  checkWhole('stations', count, 1, 20_000);
  if (years !== undefined) checkWhole('years', years, 1, 150);

  const drainage = layDrainage(seed, Math.max(LEAST_CELLS, CELLS_PER_STATION * count));
  const { rivers, riverOf } = traceRivers(drainage, RIVER_CELLS);
  const sites = chooseSites(seed, drainage, riverOf, count);
  const traits = drawTraits(seed, sites, years ?? null);
  const names = nameRivers(seed, drainage, rivers, sites);
  const stations = describeStations(seed, drainage, rivers, sites, traits, names);
  const furnishings = furnished ? furnish(sites, traits, stations) : BARE;
  return {
    name: REGION_NAME,
    stations,
    network: sites.flatMap(({ below }, i) =>
      below < 0 ? [] : [{ upstream: stations[i].code, downstream: stations[below].code }],
    ),
    furnishings,
    layers: () => drawLayers(drainage, rivers, sites, { riverNames: names, stations }, DRAWN_RIVER_CELLS),
    records: () => flowRecords(seed, drainage, sites, traits, stations, furnishings),
  };
}

function checkWhole(name: string, value: number, low: number, high: number): void {
  if (Number.isInteger(value) && value >= low && value <= high) return;
  throw new RangeError(`generateRegion: ${name} must be a whole number in ${low}..${high}, got ${value}`);
}

/** Names for the rivers with a station, the largest first; the others stay without. */
function nameRivers(
  seed: number,
  { upstreamCells }: Drainage,
  rivers: readonly River[],
  sites: readonly Site[],
): string[] {
  const size = ({ cells }: River) => upstreamCells[cells[Math.max(0, cells.length - 2)]];
  const names = new Array<string>(rivers.length).fill('');
  const pool = riverNames(seed);
  const gauged = [...new Set(sites.map(({ river }) => river))].sort((a, b) => size(rivers[b]) - size(rivers[a]));
  for (const river of gauged) names[river] = String(pool.next().value);
  return names;
}

/** How the land differs from place to place. */
interface Land {
  geology: NoiseField;
  rain: NoiseField;
  change: NoiseField;
  width: number;
  height: number;
}

/** °C by which the farthest divide is cooler than the mouth. */
const COOLER_ABOVE = 4;
/** The same for gauges, by height squared: they stand in valleys, where cold air gathers in the uplands only. */
const GAUGE_COOLER_ABOVE = 6;

function catchmentAt(site: Site, traits: Traits, land: Land): Catchment {
  const [x, y] = site.middle;
  const [east, north] = [x / land.width, y / land.height];
  const hard = land.geology(x, y);
  // Recharge falls most in the south-east, least in the north-west, where some corners even gain.
  const inland = 0.5 * east + 0.5 * (1 - north);
  return {
    corners: [(1 - east) * (1 - north), east * (1 - north), (1 - east) * north, east * north],
    rainFactor: (0.8 + 0.75 * site.ownHeight) * (1.12 - 0.35 * east) * (1 + 0.12 * land.rain(x, y)),
    cooler: COOLER_ABOVE * site.ownHeight,
    soilMm: 190 - 60 * site.ownHeight + 40 * hard,
    slowShare: traits.spring ? 0.97 : Math.min(0.8, Math.max(0.25, 0.5 + 0.35 * hard)),
    fastDays: 3,
    slowDays: traits.spring ? 260 : 100 + 80 * hard,
    rechargeTrend: Math.max(-0.11, 0.03 - 0.15 * inland + 0.06 * land.change(x, y)),
  };
}

/** Flows of all sites: each its own land's runoff and what comes down from the sites above, changed by what is done to
 *  the river there. A site's true flow is dropped as soon as the site below has taken it in. */
function* flowRecords(
  seed: number,
  { grid }: Drainage,
  sites: readonly Site[],
  traits: readonly Traits[],
  stations: readonly SeedStation[],
  furnishings: Furnishings,
): Generator<SeedRecord> {
  const firstDay = traits.reduce((first, each) => Math.min(first, each.firstDay), Number.POSITIVE_INFINITY);
  const lastDay = traits.reduce((last, each) => Math.max(last, each.lastDay), Number.NEGATIVE_INFINITY);
  const weather = makeWeather(seed, dateOfDay(firstDay).year - RUN_IN_YEARS, lastDay);
  const [width, height] = grid.position(grid.cells - 1);
  const field = (purpose: string, scale: number) => fractalNoise(seed, purpose, { scale, octaves: 3 });
  const land: Land = {
    geology: field('geology', 45),
    rain: field('rain', 60),
    change: field('change', 70),
    width,
    height,
  };

  const above: number[][] = sites.map(() => []);
  const mouths: number[] = [];
  for (const [i, { below }] of sites.entries()) (below < 0 ? mouths : above[below]).push(i);
  for (const mouth of mouths) yield* from(mouth);

  function* from(i: number): Generator<SeedRecord, Float64Array> {
    const random = randomStream(seed, 'flow', i);
    const site = sites[i];
    const catchment = catchmentAt(site, traits[i], land);
    const flow = runoffOf(weather, catchment, random);
    // 1 mm a day on 1 km² is 1/86.4 m³/s.
    const m3sPerMm = (site.ownCells * CELL_KM2) / 86.4;
    for (let day = 0; day < flow.length; day += 1) flow[day] *= m3sPerMm;
    for (const upper of above[i]) addUpstream(flow, yield* from(upper));
    const whole = furnishings.works?.site === i ? flow.slice() : null;
    applyInfluences(weather, flow, traits[i]);
    const taken = whole?.map((before, day) => before - flow[day]) ?? null;
    const record = observe(
      weather,
      flow,
      traits[i],
      GAUGE_COOLER_ABOVE * site.height ** 2,
      randomStream(seed, 'gauge', i),
    );
    const marks = furnishings.faulty === i ? plantFaults(record, site.cells * CELL_KM2) : [];
    const place = { seed, station: stations[i], traits: traits[i], flow: record, weather, land: catchment, taken };
    const codeList = CODES.map((code) => ({ ...code }));
    const beside = besideOf(furnishings, i, place);
    yield { code: stations[i].code, unit: 'm3/s', ...record, codeList, beside, marks };
    return flow;
  }
}

/** Water from the next station above: most of it arrives the same day, the rest the day after. */
function addUpstream(flow: Float64Array, upper: Float64Array): void {
  flow[0] += upper[0];
  for (let day = 1; day < flow.length; day += 1) flow[day] += 0.7 * upper[day] + 0.3 * upper[day - 1];
}

function applyInfluences(weather: Weather, flow: Float64Array, traits: Traits): void {
  if (traits.damYear !== null) dam(weather, flow, traits.damYear);
  if (traits.abstraction) abstraction(weather, flow, traits.abstraction.fromYear, traits.abstraction.share);
  if (traits.returnFlow) returnFlow(weather, flow, traits.returnFlow.fromYear, traits.returnFlow.share);
  if (traits.dryShare !== null) seepage(weather, flow, traits.dryShare, traits.firstDay);
}
