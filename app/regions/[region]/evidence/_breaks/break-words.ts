import { fixed, MISSING, signed } from '@/app/components/format';
import type { RegionBreaks } from '@/lib/region/break-types';

type Summary = RegionBreaks['summary'][number];

/** One break in a sentence. Example: "1990 and after: of 33 stations 12 are lower and 2 higher; the median station changes
 *  by −14 %." */
export function summaryWords({ label, tested, lower, higher, medianPercent }: Summary): string {
  if (tested === 0) return `${label}: no ranked station has enough years on both sides.`;
  const of = tested === 1 ? 'the one station tested' : `${fixed(tested)} stations tested`;
  const be = (number: number) => (number === 1 ? 'is' : 'are');
  const change = signed(medianPercent, 0);
  return `${label}: of ${of} ${fixed(lower)} ${be(lower)} lower and ${fixed(higher)} higher, after allowing for false discoveries${
    change === MISSING ? '' : `; the median change is ${change}\u00a0%`
  }.`;
}

/** The breaks in one sentence or two; null where there is nothing to part the years. */
export function breaksSentence({ summary }: Pick<RegionBreaks, 'summary'>): string | null {
  const tested = summary.filter(({ tested }) => tested > 0);
  return tested.length === 0 ? null : tested.map(summaryWords).join(' ');
}
