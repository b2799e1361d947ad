import type { AnnualIndexName } from '../basis.ts';
import { type CompletenessRule, END_YEARS, tooManyZeros, yearsNeeded } from './completeness.ts';
import { INDEX_FACTS } from './index-facts.ts';
import { INDEX_WORDS } from './index-words.ts';
import type { UsedYears } from './used-years.ts';

/** Where a station stands before any trend is looked at. */
export type Standing =
  | { kind: 'ranked' }
  /** complete enough, but with a third or more zero minima: compared by its zero-flow days */
  | { kind: 'drying'; reason: string }
  | { kind: 'unranked'; reason: string };

/** Whether a station is ranked: usable years ≥ minYears, ≥ minCoverage of the period, of its first ten and of its last
 *  ten years, and fewer than a third of the flows compared (minima unless the basis says otherwise) zero. Where 0 is a
 *  figure like others there is no such rule, but a station without a single zero-flow day, or day of deficit, is not
 *  ranked by them.
 *  @param used    the usable years inside the period
 *  @param period  [first, last]; null judges the station over its own years, from the first usable to the last
 *  @returns       every rule that failed, in words and figures */
export function standingOf(
  used: UsedYears,
  period: readonly [number, number] | null,
  { minYears, minCoverage, index = 'minimum' }: CompletenessRule & { index?: AnnualIndexName },
): Standing {
  const { years, zeroValues } = used;
  const n = years.length;
  if (n === 0) {
    const withFigure = index === 'minimum' ? '' : ` with ${INDEX_WORDS[index].one}`;
    const inPeriod = period === null ? '' : ` in ${spanWords(period)}`;
    return { kind: 'unranked', reason: `no usable year${withFigure}${inPeriod}` };
  }
  const [first, last] = period ?? [years[0], years[n - 1]];
  const failed: string[] = [];
  if (n < minYears) failed.push(`${count(n, 'usable year')}, ${minYears} needed`);
  const share = `${Number((minCoverage * 100).toFixed(4))} %`;
  const judge = (from: number, to: number, words: (length: number) => string) => {
    const length = to - from + 1;
    const needed = yearsNeeded(minCoverage, length);
    const usable = years.filter((year) => year >= from && year <= to).length;
    if (usable < needed) failed.push(`${usable} of ${words(length)} usable, ${needed} needed (${share})`);
  };
  judge(first, last, (length) => `the ${count(length, 'year')} ${spanWords([first, last])}`);
  if (last - first + 1 > END_YEARS) {
    judge(first, first + END_YEARS - 1, () => `the first ten years ${spanWords([first, first + END_YEARS - 1])}`);
    judge(last - END_YEARS + 1, last, () => `the last ten years ${spanWords([last - END_YEARS + 1, last])}`);
  }
  const { zeroRule } = INDEX_FACTS[index];
  const { many, none } = INDEX_WORDS[index];
  const zeros = tooManyZeros(zeroValues, n, zeroRule)
    ? zeroRule === 'all'
      ? `${none} in any of its ${count(n, 'usable year')}`
      : `${zeroValues} of ${n} ${many} are zero, a third or more`
    : null;
  if (failed.length) return { kind: 'unranked', reason: [...failed, ...(zeros ? [zeros] : [])].join('; ') };
  if (zeros === null) return { kind: 'ranked' };
  if (zeroRule === 'all') return { kind: 'unranked', reason: zeros };
  return { kind: 'drying', reason: `${zeros}: listed under Drying, by zero-flow days` };
}

const spanWords = ([first, last]: readonly [number, number]): string =>
  first === last ? `${first}` : `${first}–${last}`;

const count = (n: number, noun: string): string => `${n} ${noun}${n === 1 ? '' : 's'}`;
