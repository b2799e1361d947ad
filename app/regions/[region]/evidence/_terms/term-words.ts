import { count, fixed } from '@/app/components/format';
import type { Alternative, Movement } from '@/lib/region/window-types';

export const TERM_WORDS: Record<Alternative['term'], string> = {
  days: 'Length of the minimum',
  yearStart: 'Start of the low-flow year',
  season: 'Season',
  period: 'Years',
  serialCorrection: 'Serial correction',
};

/** A station in two rankings. Examples: "Upper Alder, up 12 places: 15 here, 3 there", "Upper Alder: not ranked here, 3 there".
 *  Where stations come or go the places themselves say less than the move among those ranked on both, and are left out.
 *  @param before  what the ranking of `before` is called; `after` likewise */
export function movementWords(movement: Movement, { before = 'here', after = 'there' } = {}): string {
  const { name, before: from, after: to, moved } = movement;
  const place = (at: number | null, where: string) => `${at === null ? 'not ranked' : fixed(at)} ${where}`;
  const places = `${place(from, before)}, ${place(to, after)}`;
  if (moved === null || moved === 0) return `${name}: ${places}`;
  const move = `${moved > 0 ? 'up' : 'down'} ${count(Math.abs(moved), 'place')}`;
  const told = from !== null && to !== null && from - to === moved;
  return told ? `${name}, ${move}: ${places}` : `${name}, ${move} among those ranked on both`;
}

/** What the other terms say in one sentence: between which shares of the ranked stations the answer lies, and where the order
 *  changes most. Choices that leave fewer than half of the stations are another region's answer, and left out.
 *  @param alternatives  of all terms, the choices at hand among them */
export function termsSentence(alternatives: readonly Alternative[]): string | null {
  const here = alternatives.find(({ current }) => current);
  const least = (here?.ranked ?? 0) / 2;
  const tried = alternatives.filter(({ current, problem, ranked }) => !current && problem === null && ranked > 0);
  const others = tried.filter(({ ranked }) => ranked >= least);
  if (others.length === 0) return null;
  const sorted = [...others].sort((a, b) => a.falling / a.ranked - b.falling / b.ranked);
  const [fewest, most] = [sorted[0], sorted[sorted.length - 1]];
  const left = tried.length - others.length;
  const opening = `On ${count(others.length, 'other choice')} of one term${left > 0 ? ` that ${others.length === 1 ? 'keeps' : 'keep'} at least half of the stations` : ''}`;
  const counts =
    others.length === 1
      ? `${fallingOf(fewest)} fall (${fewest.label})`
      : fallingOf(fewest) === fallingOf(most)
        ? `${fallingOf(fewest)} fall on each`
        : `between ${fallingOf(fewest)} (${fewest.label}) and ${fallingOf(most)} (${most.label}) fall`;
  const known = here ? `, ${fallingOf(here)} on these` : '';
  return `${opening} ${counts}${known}, after allowing for false discoveries${orderWords(others)}.`;
}

const fallingOf = ({ falling, ranked }: Alternative): string => `${fixed(falling)} of ${fixed(ranked)}`;

function orderWords(others: readonly Alternative[]): string {
  const unlike = others
    .filter((other): other is Alternative & { tau: number } => other.tau !== null)
    .sort((a, b) => a.tau - b.tau)[0];
  if (!unlike || unlike.movedFar === 0) return '; the order of the stations hardly changes';
  const move = unlike.movedFar === 1 ? 'station moves' : 'stations move';
  return `; the order changes most under ${unlike.label}: ${fixed(unlike.movedFar)} ${move} by more than a tenth of the places`;
}
