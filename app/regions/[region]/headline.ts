import { count, fixed, percent } from '@/app/components/format';
import type { AnnualIndexName } from '@/lib/basis';
import type { MapRow } from './map-row.ts';

/** What one station, and several, do: towards drier or earlier first, then the other way. */
type Verbs = readonly [down: readonly [one: string, many: string], up: readonly [one: string, many: string]];

const FALL_AND_RISE: Verbs = [
  ['falls', 'fall'],
  ['rises', 'rise'],
];
const VERBS: Partial<Record<AnnualIndexName, Verbs>> = {
  'zero-flow-days': [
    ['is dry for longer', 'are dry for longer'],
    ['is dry for shorter', 'are dry for shorter'],
  ],
  'minimum-date': [
    ['has its low earlier', 'have their lows earlier'],
    ['has it later', 'have them later'],
  ],
  deficit: [
    ['has larger deficits', 'have larger deficits'],
    ['has smaller ones', 'have smaller ones'],
  ],
};

/** Where both ways begin alike, what none of several does. */
const NEITHER: Partial<Record<AnnualIndexName, string>> = {
  'zero-flow-days': 'is dry for longer or for shorter',
  deficit: 'has larger or smaller deficits',
};

/** The answer in one line: how many ranked stations fall and rise, and how many of those may be chance.
 *  @param index  what is compared: dates come earlier or later, deficits are larger or smaller
 *  Example: "10 of 33 ranked stations fall and 2 rise, with at most 10 % false discoveries expected." */
export function headline(rows: MapRow[], alpha: number, index: AnnualIndexName = 'minimum'): string {
  const ranked = rows.filter((row) => row.rank !== null);
  const falling = ranked.filter((row) => row.trend === 'falling').length;
  const rising = ranked.filter((row) => row.trend === 'rising').length;
  if (ranked.length === 0) return 'No station can be ranked on these terms.';
  const [down, up] = VERBS[index] ?? FALL_AND_RISE;
  const chance = `with at most ${percent(alpha, alpha < 0.01 ? 1 : 0)} false discoveries expected`;
  const still = falling + rising === 0 ? ' No significant trend is not no change.' : '';
  if (ranked.length === 1) {
    const does = falling ? down[0] : rising ? up[0] : `neither ${down[0]} nor ${up[0]}`;
    return `The one ranked station ${does}, ${chance}.${still}`;
  }
  const of = `${fixed(ranked.length)} ranked stations`;
  if (falling + rising === 0) return `None of ${of} ${NEITHER[index] ?? `${down[0]} or ${up[0]}`}, ${chance}.${still}`;
  const fall = `${falling === 0 ? 'None' : fixed(falling)} of ${of} ${down[falling <= 1 ? 0 : 1]}`;
  const rise = rising === 0 ? `none ${up[0]}` : `${fixed(rising)} ${up[rising === 1 ? 0 : 1]}`;
  return `${fall} and ${rise}, ${chance}.`;
}

/** What stands beside the ranking: "2 stations are listed as drying and 3 are not ranked." Empty when there is none. */
export function besideRanking(rows: MapRow[]): string {
  const drying = rows.filter((row) => row.drying).length;
  const unranked = rows.filter((row) => row.rank === null && !row.drying).length;
  const parts: string[] = [];
  if (drying) parts.push(`${count(drying, 'station')} ${drying === 1 ? 'is' : 'are'} listed as drying`);
  if (unranked) {
    parts.push(`${drying ? fixed(unranked) : count(unranked, 'station')} ${unranked === 1 ? 'is' : 'are'} not ranked`);
  }
  return parts.length ? `${parts.join(' and ')}.` : '';
}
