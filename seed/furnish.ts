import { dayNumber, parseIsoDate } from '../lib/calendar/day.ts';
import type { DerivedRecipe } from '../lib/series/station-history.ts';
import { pumpedBeside, type SeedBeside, stageBeside, weatherBeside } from './beside.ts';
import type { Catchment } from './catchment-flow.ts';
import type { SeedStation } from './describe.ts';
import { randomStream } from './random.ts';
import type { Site } from './sites.ts';
import type { Traits } from './traits.ts';
import type { Weather } from './weather.ts';

/** What the demo region shows beyond flows, by the index of the site at which it is. Empty for other regions. */
export interface Furnishings {
  stage: readonly number[];
  weather: readonly number[];
  /** where faults are planted for the checks to find */
  faulty: number | null;
  /** where an abstraction is metered, and the code under which it is kept */
  works: { site: number; code: string } | null;
  /** stations that no site stands for: the meter of the abstraction, and the naturalised flow derived with it */
  extras: (SeedStation & { derived: DerivedRecipe | null })[];
  /** links that a person has confirmed; the others are left to be suggested */
  links: { upstream: string; downstream: string }[];
}

export const BARE: Furnishings = { stage: [], weather: [], faulty: null, works: null, extras: [], links: [] };

/** Furnishes the demo region, and says so in the notes of the stations concerned (changing `stations`). */
export function furnish(sites: readonly Site[], traits: readonly Traits[], stations: SeedStation[]): Furnishings {
  const find = (wanted: (traits: Traits, i: number) => boolean) => {
    const at = traits.findIndex(wanted);
    return at < 0 ? [] : [at];
  };
  const rebuilt = stations.findIndex(({ changes }) =>
    changes.some(({ kind, date }) => kind === 'weir changed' && date > '1995'),
  );
  const [faulty = null] = find(({ notes }) => notes.includes('young'));
  if (faulty !== null) {
    const told =
      'Its logger has stuck, slipped a decimal point and written values below zero; a month stands twice in its files.';
    stations[faulty].notes = `${stations[faulty].notes} ${told}`;
  }
  // The smallest river that is pumped from: there the difference shows most.
  const [pumpedAt] = traits
    .flatMap((each, i) => (each.abstraction ? [i] : []))
    .sort((a, b) => sites[a].cells - sites[b].cells);
  // Where nothing but the weather and the land act: its lows follow the rain that is gauged beside it.
  const [followsRain] = find(({ influence, firstDay, gapYears, cubicFeetYears, dryShare, spring }, i) => {
    const undisturbed = influence === 'natural' && !spring && dryShare === null;
    const headwater = sites.every(({ below }) => below !== i);
    return (
      undisturbed && headwater && gapYears === null && cubicFeetYears === null && firstDay <= dayNumber(1975, 1, 1)
    );
  });
  const works = pumpedAt === undefined ? null : { site: pumpedAt, code: `${stations[pumpedAt].code}P` };
  return {
    stage: [...new Set([0, ...find(({ damYear }) => damYear !== null), ...(rebuilt < 0 ? [] : [rebuilt])])],
    weather: [
      ...find(({ spring }) => spring),
      ...find(({ returnFlow }) => returnFlow !== null),
      ...(followsRain === undefined ? [] : [followsRain]),
    ],
    faulty,
    works,
    extras: works === null ? [] : worksOf(stations[works.site], works.code),
    links: sites.flatMap(({ river, below }, i) =>
      below < 0 || sites[below].river !== river
        ? []
        : [{ upstream: stations[i].code, downstream: stations[below].code }],
    ),
  };
}

function worksOf(station: SeedStation, code: string): Furnishings['extras'] {
  const nowhere = { latitude: null, longitude: null, changes: [], namedFlows: [] };
  return [
    {
      ...{ ...nowhere, code, river: station.river, areaKm2: null, influence: 'abstracted', derived: null },
      name: `${station.name}: pumped by the water works`,
      notes: 'What the water works takes out, metered since 2009. Not a flow of the river.',
    },
    {
      ...{ ...nowhere, code: `${station.code}N`, river: station.river, areaKm2: station.areaKm2, influence: 'natural' },
      name: `${station.name}, naturalised`,
      notes: 'The flow as it would be if the water works took nothing.',
      derived: {
        quantity: 'flow',
        terms: [
          { code: station.code, factor: 1, lagDays: 0 },
          { code, factor: 1, lagDays: 0 },
        ],
        note: 'The pumping station stands at the gauge: no travel time.',
      },
    },
  ];
}

/** The records kept beside the flow of site `i`. */
export function besideOf(
  { stage, weather: gauged, works }: Furnishings,
  i: number,
  {
    seed,
    station,
    traits,
    flow,
    weather,
    land,
    taken,
  }: {
    seed: number;
    station: SeedStation;
    traits: Traits;
    /** as observed */
    flow: { firstDay: number; values: Float64Array };
    weather: Weather;
    land: Catchment;
    /** m³/s taken out of the river, on every day of the weather; null where nothing is */
    taken: Float64Array | null;
  },
): SeedBeside[] {
  const found: SeedBeside[] = [];
  if (stage.includes(i)) {
    const weir = station.changes.find(({ kind }) => kind === 'weir changed');
    const weirDay = weir ? parseIsoDate(weir.date) : null;
    found.push(stageBeside(station.code, flow, { areaKm2: station.areaKm2 ?? 100, weirDay }));
  }
  if (gauged.includes(i)) {
    found.push(...weatherBeside(station.code, weather, land, traits, randomStream(seed, 'rain gauge', i)));
  }
  if (works?.site === i && taken) {
    found.push(pumpedBeside(works.code, weather, taken, traits, randomStream(seed, 'pump', i)));
  }
  return found;
}
