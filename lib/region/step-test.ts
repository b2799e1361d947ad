import type { AnnualIndexName } from '../basis.ts';
import { hodgesLehmann } from '../statistics/hodges-lehmann.ts';
import { median } from '../statistics/quantile.ts';
import { rankSum } from '../statistics/rank-sum.ts';
import type { Break, Segment, StepTest } from './break-types.ts';
import { percentOfMean } from './index-facts.ts';
import { orNull } from './or-null.ts';
import { factorOfPart, type RowSerialTerms } from './row-serial-terms.ts';

/** Fewer usable years on a side are not tested: the normal approximation of the rank-sum test would not hold. */
const FEWEST_SIDE_YEARS = 5;
/** Fewer on a side are tested with a warning. */
const FEW_SIDE_YEARS = 10;

/** The years between two breaks with what was seen in them. */
export interface Part {
  segment: Segment;
  values: number[];
}

/** The usable years of [first, last] as a part; median and mean are null without any. */
export function partOf(years: readonly number[], values: readonly number[], [first, last]: [number, number]): Part {
  const inside = values.filter((_, i) => years[i] >= first && years[i] <= last);
  const n = inside.length;
  const mean = n === 0 ? null : inside.reduce((sum, value) => sum + value, 0) / n;
  return { segment: { first, last, years: n, median: n === 0 ? null : median(inside), mean }, values: inside };
}

export interface StepOptions {
  terms: RowSerialTerms;
  /** null: a percentage of what is compared means nothing */
  percentOf: AnnualIndexName | null;
}

/** Level of one part against the part before it, at a break that was fixed beforehand: Hodges–Lehmann difference with
 *  interval and rank-sum test, both with the serial factor for the years of the two parts. Fewer than 5 usable years on a
 *  side are not tested, fewer than 10 only with a warning. `pAdjusted` is left to the caller, who knows the family.
 *  Sources: at `hodgesLehmann`, `rankSum`. */
export function stepTest(known: Break, before: Part, after: Part, { terms, percentOf }: StepOptions): StepTest {
  const sides: [string, number][] = [
    ['before', before.values.length],
    ['after', after.values.length],
  ];
  const head = { break: known, before: before.segment, after: after.segment };
  const serialFactor = factorOfPart(before.values.length + after.values.length, terms);
  const few = (limit: number) =>
    sides
      .filter(([, years]) => years < limit)
      .map(([side, years]) => `${years} usable year${years === 1 ? '' : 's'} ${side}`)
      .join(', ');
  if (few(FEWEST_SIDE_YEARS)) {
    const warning = `${few(FEWEST_SIDE_YEARS)}: not tested below ${FEWEST_SIDE_YEARS}`;
    return { ...head, ...NO_TEST, serialFactor, warning };
  }
  const { z, p } = rankSum(before.values, after.values, serialFactor);
  const { difference, low, high } = hodgesLehmann(before.values, after.values, { varianceFactor: serialFactor });
  const percent = (amount: number) =>
    percentOf === null ? null : percentOfMean(orNull(amount), percentOf, before.segment.median);
  return {
    ...head,
    difference: orNull(difference),
    low: orNull(low),
    high: orNull(high),
    percent: percent(difference),
    percentLow: percent(low),
    percentHigh: percent(high),
    z: orNull(z),
    p: orNull(p),
    pAdjusted: null,
    serialFactor,
    warning: few(FEW_SIDE_YEARS) ? `only ${few(FEW_SIDE_YEARS)}: little can be told from them` : '',
  };
}

const NO_TEST = {
  difference: null,
  low: null,
  high: null,
  percent: null,
  percentLow: null,
  percentHigh: null,
  z: null,
  p: null,
  pAdjusted: null,
} as const;
