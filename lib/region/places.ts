import { roundSignificant } from '../series/round-significant.ts';

/** Figures that agree to this many significant digits are equal: the rest is rounding. */
const FIGURE_DIGITS = 10;

/** Something to be ranked: its figure, null when it has none, and the code it is listed by among equals. */
export interface Candidate {
  figure: number | null;
  code: string;
}

/** Ranks by figure, smallest first: place 1 is the steepest decline.
 *  Equal figures share the better place (1, 2, 2, 4) and are listed by code. Those without a figure come after all that
 *  have one, and share the place there.
 *  @returns `order`: positions in `candidates`, best place first; `place`: the place of each candidate, from 1 */
export function placesOf(candidates: readonly Candidate[]): { order: number[]; place: number[] } {
  const keys = candidates.map(({ figure }) =>
    figure === null ? Number.POSITIVE_INFINITY : roundSignificant(figure, FIGURE_DIGITS),
  );
  const order = candidates.map((_, i) => i);
  order.sort((a, b) => (keys[a] === keys[b] ? byCode(candidates[a].code, candidates[b].code) : keys[a] - keys[b]));
  const place = new Array<number>(candidates.length);
  order.forEach((candidate, i) => {
    const before = order[i - 1];
    place[candidate] = i > 0 && keys[before] === keys[candidate] ? place[before] : i + 1;
  });
  return { order, place };
}

/** Codes in the order of their characters, the same in every locale. */
export function byCode(a: string, b: string): number {
  if (a === b) return 0;
  return a < b ? -1 : 1;
}
