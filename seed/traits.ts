import { dayNumber } from '../lib/calendar/day.ts';
import type { Influence } from '../lib/region/ranking-types.ts';
import { type RandomStream, randomStream } from './random.ts';
import type { Site } from './sites.ts';

/** What is particular about a site, its river and its record. */
export interface Traits {
  influence: Influence;
  /** drainage area means nothing at a spring */
  spring: boolean;
  damYear: number | null;
  abstraction: { fromYear: number; share: number } | null;
  returnFlow: { fromYear: number; share: number } | null;
  /** share of years in which the bed runs dry */
  dryShare: number | null;
  /** the record as kept: first and last day, a stretch of years without any, a stretch in the wrong unit */
  firstDay: number;
  lastDay: number;
  gapYears: readonly [number, number] | null;
  cubicFeetYears: readonly [number, number] | null;
  /** day from which values are provisional */
  provisionalFrom: number;
  notes: string;
}

/** The kinds that every region has, with their share of the stations; at least one each from 20 stations on. */
const KINDS = [
  ['dam', 1 / 36],
  ['abstracted', 3 / 36],
  ['spring', 2 / 36],
  ['often-dry', 2 / 36],
  ['sometimes-dry', 2 / 36],
  ['urban', 2 / 36],
  ['short', 1 / 36],
  ['gap', 1 / 36],
  ['unit-slip', 1 / 36],
  ['closed', 1 / 36],
] as const;
type Kind = (typeof KINDS)[number][0];

/** What a kind looks at to find its site. */
interface Place {
  site: Site;
  /** no site further up */
  headwater: boolean;
  /** the largest catchment of the region, in cells */
  largest: number;
  /** 0 in the north-west to 1 in the south-east, where it is driest */
  southEast: number;
}

/** How well a place suits a kind, in the kind's own terms; below 0 not at all. */
const FITNESS: Record<Kind, (place: Place) => number> = {
  // On a river of some size, not the main stem.
  dam: ({ site, largest }) => 1 - Math.abs(Math.log(site.cells / (largest / 12))),
  abstracted: ({ site, largest }) => (site.cells < largest / 5 ? 1.2 - site.height : -1),
  spring: ({ site, headwater }) => (headwater ? 1.5 - Math.log10(site.cells) / 2 - Math.abs(site.height - 0.4) : -1),
  'often-dry': ({ site, headwater, southEast }) => (headwater ? 2 + 2 * southEast - Math.log10(site.cells) : -1),
  'sometimes-dry': ({ site, headwater, southEast }) => (headwater ? 2 + southEast - Math.log10(site.cells) : -1),
  urban: ({ site, headwater, southEast }) => (headwater ? 2 - site.height - southEast : -1),
  short: ({ headwater }) => (headwater ? 1 : 0.5),
  gap: ({ headwater }) => (headwater ? 1 : 0.2),
  'unit-slip': ({ headwater }) => (headwater ? 1 : 0.2),
  closed: () => 1,
};

export const LAST_YEAR = 2024;

/** Gives each site its traits.
 *  @param years  length of every record, or null for 25 to 90 years and the odd short one */
export function drawTraits(seed: number, sites: readonly Site[], years: number | null): Traits[] {
  const random = randomStream(seed, 'traits');
  const hasAbove = new Set(sites.map(({ below }) => below));
  const largest = Math.max(...sites.map(({ cells }) => cells));
  const [east, north] = [0, 1].map((axis) => Math.max(...sites.map(({ middle }) => middle[axis])));
  const places = sites.map((site, i): Place => {
    const [x, y] = site.middle;
    return { site, headwater: !hasAbove.has(i), largest, southEast: (x / east + 1 - y / north) / 2 };
  });
  const kinds = new Map<number, Kind>();
  for (const [kind, share] of KINDS) {
    const wanted = Math.max(sites.length >= 20 ? 1 : 0, Math.round(share * sites.length));
    places
      .map((place, i) => ({ i, fit: FITNESS[kind](place) + random.between(0, 0.5) }))
      .filter(({ i, fit }) => fit > 0 && i > 0 && !kinds.has(i))
      .sort((a, b) => b.fit - a.fit)
      .slice(0, wanted)
      .forEach(({ i }) => {
        kinds.set(i, kind);
      });
  }
  return sites.map((_, i) => traitsOf(kinds.get(i), years, randomStream(seed, 'traits', i)));
}

/** Kinds whose story needs a record from the early 1970s on. */
const NEEDS_HISTORY: readonly (Kind | undefined)[] = [
  'gap',
  'unit-slip',
  'dam',
  'abstracted',
  'urban',
  'often-dry',
  'sometimes-dry',
  'closed',
];

/** Years of record: most networks grew up in the 1960s and 70s, a few gauges reach back to the 1930s, some are young. */
function drawLength(kind: Kind | undefined, random: RandomStream): number {
  if (kind === 'short') return 13;
  const draw = random.uniform();
  const length = Math.round(
    draw < 0.22 ? random.between(62, 90) : draw < 0.9 ? random.between(43, 60) : random.between(25, 38),
  );
  return NEEDS_HISTORY.includes(kind) ? Math.max(length, 52) : length;
}

/** When the record begins, ends and stops being approved. */
function drawSpan(kind: Kind | undefined, years: number | null, random: RandomStream) {
  const firstYear = LAST_YEAR + 1 - (years ?? drawLength(kind, random));
  // Some gauges were opened in autumn.
  const firstMonth = random.uniform() < 0.7 || years !== null ? 1 : 10;
  const firstDay = dayNumber(firstYear, firstMonth, 1);
  const late = random.uniform() < 0.8;
  if (years !== null) {
    return { firstDay, lastDay: dayNumber(LAST_YEAR, 12, 31), provisionalFrom: dayNumber(LAST_YEAR, 12, 1) };
  }
  if (kind === 'closed')
    return { firstDay, lastDay: dayNumber(2016, 9, 30), provisionalFrom: Number.POSITIVE_INFINITY };
  return {
    firstDay,
    lastDay: dayNumber(LAST_YEAR + 1, 5, 31),
    provisionalFrom: late ? dayNumber(LAST_YEAR + 1, 4, 1) : dayNumber(LAST_YEAR, 10, 1),
  };
}

function traitsOf(kind: Kind | undefined, years: number | null, random: RandomStream): Traits {
  const between = (low: number, high: number) => Math.round(random.between(low, high));
  const traits: Traits = {
    influence: random.uniform() < 0.06 ? 'unknown' : 'natural',
    spring: false,
    damYear: null,
    abstraction: null,
    returnFlow: null,
    dryShare: null,
    ...drawSpan(kind, years, random),
    gapYears: null,
    cubicFeetYears: null,
    notes: '',
  };
  switch (kind) {
    case 'dam':
      return { ...traits, influence: 'regulated', damYear: between(1988, 1994) };
    case 'abstracted': {
      const taken = { fromYear: between(1978, 1986), share: random.between(0.28, 0.38) };
      return { ...traits, influence: 'abstracted', abstraction: taken };
    }
    case 'spring':
      return {
        ...traits,
        influence: 'spring-fed',
        spring: true,
        notes: 'Fed by springs; the surface catchment says nothing of the flow.',
      };
    case 'often-dry':
      return { ...traits, dryShare: random.between(0.55, 0.65), notes: 'The bed runs dry in most summers.' };
    case 'sometimes-dry':
      return { ...traits, dryShare: random.between(0.22, 0.28), notes: 'The bed runs dry in some summers.' };
    case 'urban': {
      const brought = { fromYear: between(1968, 1976), share: random.between(0.9, 1.3) };
      return { ...traits, influence: 'urban', returnFlow: brought };
    }
    case 'short':
      return { ...traits, notes: 'A young station.' };
    case 'gap':
      return { ...traits, gapYears: [1994, 2003], notes: 'Closed from 1994 to 2003 and opened again.' };
    case 'unit-slip':
      return { ...traits, cubicFeetYears: [1978, 1987], notes: 'Ten years were taken over from another archive.' };
    case 'closed':
      return { ...traits, notes: 'Closed in September 2016.' };
    default:
      return traits;
  }
}
