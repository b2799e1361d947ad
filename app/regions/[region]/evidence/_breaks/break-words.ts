import { fixed, MISSING, signed } from '@/app/components/format';
import type { RegionBreaks } from '@/lib/region/break-types';

type Summary = RegionBreaks['summary'][number];

/** One kind of break in a sentence. Example: "From 1990/91 on: of 33 comparisons 12 are lower after and 2 higher, allowing for
 *  false discoveries; the median change is −14 %." */
export function summaryWords({ label, tested, lower, higher, medianPercent }: Summary): string {
  const name = label.charAt(0).toUpperCase() + label.slice(1);
  if (tested === 0) return `${name}: no ranked station has usable years on both sides.`;
  const change = signed(medianPercent, 0);
  const median = change === MISSING ? '' : `the ${tested === 1 ? '' : 'median '}change is ${change}\u00a0%`;
  if (tested === 1) {
    const found = lower ? 'it is lower after' : higher ? 'it is higher after' : 'no difference is found';
    return `${name}: at the one station compared ${found}, allowing for false discoveries${median && `; ${median}`}.`;
  }
  const be = (number: number) => (number === 1 ? 'is' : 'are');
  const lowerWords = `${lower === 0 ? 'none' : fixed(lower)} ${be(lower === 0 ? 1 : lower)} lower after`;
  const higherWords = `${higher === 0 ? 'none' : fixed(higher)} higher`;
  return `${name}: of ${fixed(tested)} comparisons ${lowerWords} and ${higherWords}, allowing for false discoveries${median && `; ${median}`}.`;
}

/** More kinds of break than this are counted together. */
const MOST_TOLD_SINGLY = 2;

/** What the breaks say in few words; null where there is nothing to part the years. Example for many kinds: "Across 12 dated
 *  changes with usable years on both sides (abstraction 3, dam 1, weir changed 8) 2 are lower after and 1 higher, allowing for false
 *  discoveries." */
export function breaksSentence({ summary }: Pick<RegionBreaks, 'summary'>): string | null {
  const tested = summary.filter(({ tested }) => tested > 0);
  if (tested.length === 0) return null;
  if (tested.length <= MOST_TOLD_SINGLY) return tested.map(summaryWords).join(' ');
  const sum = (of: 'tested' | 'lower' | 'higher') => tested.reduce((total, one) => total + one[of], 0);
  const [lower, higher] = [sum('lower'), sum('higher')];
  const kinds = tested.map(({ label, tested }) => `${label} ${fixed(tested)}`).join(', ');
  const be = lower === 0 || lower === 1 ? 'is' : 'are';
  return `Across ${fixed(sum('tested'))} comparisons with usable years on both sides (${kinds}) ${lower === 0 ? 'none' : fixed(lower)} ${be} lower after and ${higher === 0 ? 'none' : fixed(higher)} higher, allowing for false discoveries.`;
}
