import { fixed } from '@/app/components/format';
import type { Alternative, Movement } from '@/lib/region/window-types';

export const TERM_WORDS: Record<Alternative['term'], string> = {
  days: 'Length of the minimum',
  yearStart: 'Start of the low-flow year',
  season: 'Season',
  period: 'Years',
  serialCorrection: 'Serial correction',
};

/** A station in two rankings. Example: "Upper Alder, 12 places: 15 here, 3 there"
 *  @param before  what the ranking of `before` is called; `after` likewise */
export function movementWords(movement: Movement, { before = 'here', after = 'there' } = {}): string {
  const { name, before: from, after: to, moved } = movement;
  if (from === null || to === null) {
    const place = (at: number | null, where: string) => `${at === null ? 'not ranked' : fixed(at)} ${where}`;
    return `${name}: ${place(from, before)}, ${place(to, after)}`;
  }
  if (moved === null || moved === 0) return `${name}: ${fixed(from)} ${before}, ${fixed(to)} ${after}`;
  const places = Math.abs(moved);
  return `${name}, ${fixed(places)} ${places === 1 ? 'place' : 'places'}: ${fixed(from)} ${before}, ${fixed(to)} ${after}`;
}

/** What the other terms say in one sentence: between how many stations the answer lies, and where the order changes most.
 *  @param alternatives  those that can be computed, the basis at hand among them */
export function termsSentence(alternatives: readonly Alternative[]): string | null {
  const others = alternatives.filter(({ current, problem }) => !current && problem === null);
  const here = alternatives.find(({ current }) => current);
  if (others.length === 0) return null;
  const falling = others.map((other) => other.falling);
  const rising = others.map((other) => other.rising);
  const numbers = (found: number[]) => {
    const [least, most] = [Math.min(...found), Math.max(...found)];
    return least === most ? fixed(least) : `${fixed(least)} to ${fixed(most)}`;
  };
  const counts = `On ${fixed(others.length)} other ${others.length === 1 ? 'choice' : 'choices'} of one term ${numbers(falling)} stations fall and ${numbers(rising)} rise, after allowing for false discoveries`;
  const known = here ? ` (${fixed(here.falling)} and ${fixed(here.rising)} on these terms)` : '';
  const unlike = others
    .filter((other): other is Alternative & { tau: number } => other.tau !== null)
    .sort((a, b) => a.tau - b.tau)[0];
  const order = unlike
    ? `; the order changes most under ${unlike.label}, where ${fixed(unlike.movedFar)} ${unlike.movedFar === 1 ? 'station moves' : 'stations move'} by more than a tenth of the places`
    : '';
  return `${counts}${known}${order}.`;
}
