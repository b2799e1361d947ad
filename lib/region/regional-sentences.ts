import type { AnnualIndexName, ResolvedBasis } from '../basis.ts';
import type { Group } from './groups.ts';
import type { BeyondChance, GroupAnswer, RegionalKendall } from './regional-types.ts';
import { plain, probability, signed } from './sentence-figures.ts';

/** What one station does, and what several do, on either side. */
interface Verbs {
  falls: [one: string, several: string];
  rises: [one: string, several: string];
}

const FLOW_VERBS: Verbs = { falls: ['falls', 'fall'], rises: ['rises', 'rise'] };

/** Falling always is drier, or earlier: said in the words of the index. */
const VERBS: Readonly<Record<AnnualIndexName, Verbs>> = {
  minimum: FLOW_VERBS,
  q95: FLOW_VERBS,
  'mean-flow': FLOW_VERBS,
  bfi: FLOW_VERBS,
  'zero-flow-days': {
    falls: ['dries for longer', 'dry for longer'],
    rises: ['dries for shorter', 'dry for shorter'],
  },
  'minimum-date': { falls: ['comes earlier', 'come earlier'], rises: ['comes later', 'come later'] },
  deficit: {
    falls: ['has larger deficits', 'have larger deficits'],
    rises: ['has smaller deficits', 'have smaller deficits'],
  },
};

/** Which way a common trend goes, and single slopes do: drier or earlier first. */
interface Sides {
  towards: [string, string];
  go: [string, string];
}

const DOWN_AND_UP: Sides = { towards: ['downward', 'upward'], go: ['slope down', 'up'] };
const DRIER: Sides = { towards: ['towards drier', 'towards wetter'], go: ['grow drier', 'wetter'] };
const SIDES: Partial<Record<AnnualIndexName, Sides>> = {
  'zero-flow-days': DRIER,
  deficit: DRIER,
  'minimum-date': { towards: ['towards earlier', 'towards later'], go: ['come earlier', 'later'] },
};

type Terms = Pick<ResolvedBasis, 'index' | 'alpha' | 'rankBy'>;
type Named = Pick<Group, 'label' | 'single'> & { set: GroupAnswer['set'] };

/** 0.125 → "12.5 %" */
const percent = (share: number): string => `${Number((share * 100).toFixed(2))} %`;

/** Example: "33 independent natural stations" */
function stations(count: number, { label, single, set }: Named): string {
  return `${count} ${set === 'independent' ? 'independent ' : ''}${count === 1 ? single : label}`;
}

const numberOf = (count: number, [one, several]: [string, string]): string =>
  `${count === 0 ? 'none' : count} ${count <= 1 ? one : several}`;

const upTo = (bound: number): string => (bound === 0 ? 'none' : `up to ${bound}`);

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** The count beside chance. Example: "14 of 33 natural stations fall at the 10 % level; with no trend anywhere up to 9 would,
 *  in 95 of 100 regions that share weather as these do. 1 rises; up to 8 would." */
export function chanceSentence(
  group: Named & { ranked: number },
  falling: BeyondChance,
  rising: BeyondChance,
  { index, alpha }: Terms,
): string {
  const verbs = VERBS[index];
  const [fall, ...falls] = numberOf(falling.count, verbs.falls).split(' ');
  return (
    `${capital(fall)} of ${stations(group.ranked, group)} ${falls.join(' ')} at the ${percent(alpha)} level; ` +
    `with no trend anywhere ${upTo(falling.bound)} would, in 95 of 100 regions that share weather as these do. ` +
    `${capital(numberOf(rising.count, verbs.rises))}; ${upTo(rising.bound)} would.`
  );
}

/** The one common trend. Example: "Taken together, 33 natural stations have one common trend downward at the 10 % level
 *  (regional Kendall z −3.2, p 0.0014; median −4.1 % of the mean per decade): 30 slope down, 3 up." */
export function kendallSentence(
  group: Named & { ranked: number },
  { z, p, medianFigure }: RegionalKendall,
  signs: GroupAnswer['signs'],
  basis: Terms,
): string {
  const found = p < basis.alpha;
  const sides = SIDES[basis.index] ?? DOWN_AND_UP;
  const way = z < 0 ? sides.towards[0] : sides.towards[1];
  const level = signs.zero > 0 ? `, ${signs.zero} neither way` : '';
  const median = medianFigure === null ? '' : `; median ${signed(medianFigure)} ${figureWords(basis)}`;
  return (
    `Taken together, ${stations(group.ranked, group)} have ` +
    `${found ? `one common trend ${way}` : 'no common trend'} at the ${percent(basis.alpha)} level ` +
    `(regional Kendall z ${signed(z)}, p ${probability(p, basis.alpha)}${median}): ` +
    `${signs.negative} ${sides.go[0]}, ${signs.positive} ${sides.go[1]}${level}.${found ? '' : ' This does not show that nothing changed.'}`
  );
}

/** What the ranking is by, per decade. A tau has no unit and is signed by itself. */
function figureWords({ rankBy, index }: Terms): string {
  if (rankBy === 'kendall-tau') return 'Kendall’s tau';
  if (index === 'minimum-date' || index === 'zero-flow-days') return 'days per decade';
  if (rankBy === 'percent-per-decade') return '% of the mean per decade';
  if (index === 'bfi') return 'per decade';
  return index === 'deficit' ? 'mm per decade' : 'L/s/km² per decade';
}

/** Stations by adjusted p: another question than the count beside chance. Example: "Singly, with 10 % of discoveries allowed
 *  to be false among all 40 ranked stations, 6 of 33 natural stations fall and none rises." */
export function discoveriesSentence(
  group: Named & { ranked: number },
  { falling, rising }: GroupAnswer['discoveries'],
  rankedInAll: number,
  { index, alpha }: Terms,
): string {
  const verbs = VERBS[index];
  const [fall, ...falls] = numberOf(falling, verbs.falls).split(' ');
  return (
    `Singly, with ${percent(alpha)} of discoveries allowed to be false among all ${rankedInAll} ranked stations, ` +
    `${fall} of ${stations(group.ranked, group)} ${falls.join(' ')} and ${numberOf(rising, verbs.rises)}.`
  );
}

/** Why nothing is said of a group without a station. */
export function emptySentence({ label, set }: Named): string {
  if (set === 'all') return `None of the ${label} is ranked, so nothing can be said of them together.`;
  return `The independent set holds none of the ${label}: nothing can be said of them together.`;
}

/** Why nothing is said of a group of one. Example: "Only 1 natural station is ranked, and a single station is no group: its
 *  own p says what there is to say." */
export function singleSentence(group: Named): string {
  return `Only ${stations(1, group)} is ranked, and a single station is no group: its own p says what there is to say.`;
}

/** Why the count is refused. */
export function refusalSentence(medianR1: number, limit: number): string {
  return (
    `Chance is not told: the basis corrects for no serial correlation, yet low flows carry over from year to year here ` +
    `(median lag-1 correlation ${plain(medianR1)}, above ${limit}), so that more stations would be counted than have a trend: ` +
    'in 13 to 23 of 100 regions without any trend the count would pass for more than chance. Choose another serial correction, or imitate chance with carry-over (the sieve).'
  );
}

/** Stations under Drying, which are tested by zero-flow days. Example: "3 stations under Drying are not counted here: by
 *  days without flow, with p adjusted among themselves, 1 dries for longer and none dries for shorter." */
export function dryingSentence({
  stations: count,
  falling,
  rising,
}: {
  stations: number;
  falling: number;
  rising: number;
}): string {
  const verbs = VERBS['zero-flow-days'];
  return (
    `${count} ${count === 1 ? 'station' : 'stations'} under Drying ${count === 1 ? 'is' : 'are'} not counted here: ` +
    `by days without flow, with p adjusted among themselves, ${numberOf(falling, verbs.falls)} and ${numberOf(rising, verbs.rises)}.`
  );
}
