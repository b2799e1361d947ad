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

/** All breaks in a sentence each; null where there is nothing to part the years. */
export function breaksSentence({ summary }: Pick<RegionBreaks, 'summary'>): string | null {
  const tested = summary.filter(({ tested }) => tested > 0);
  return tested.length === 0 ? null : tested.map(summaryWords).join(' ');
}
