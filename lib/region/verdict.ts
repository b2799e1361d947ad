import type { ResolvedBasis } from '../basis.ts';
import { INDEX_FACTS, percentOfMean } from './index-facts.ts';
import { indexOfYear } from './index-of-year.ts';
import { INDEX_WORDS } from './index-words.ts';
import type { RankingRow } from './ranking-types.ts';
import { intervalWords, plain, probability, signed } from './sentence-figures.ts';

/** A station's trend in one sentence, with its figures and their uncertainty; why there is none, where there is none.
 *  Example: "Falling: the 7-day minimum lost 6.2 % of its mean per decade (95 % interval −9.1 to −2.8), 1985–2024,
 *  38 usable years, adjusted p 0.003." */
export function verdict(row: RankingRow, basis: ResolvedBasis): string {
  if (row.drying && row.trend !== null) return dryingVerdict(row);
  if (row.trend === null) return `Not ranked: ${row.unrankedReason ?? 'no trend could be computed'}.`;
  const { amount, unit, low, high } = changeOf(row, basis);
  const what = `the ${indexOfYear(basis)}`;
  const where = evidence(row);
  const interval = intervalWords(low, high);
  if (row.trend === 'none') {
    return `No significant trend: ${what} changed by ${signed(amount)}${unit} per decade (${interval}), ${where}. This does not show that nothing changed.`;
  }
  const title = capitalised(INDEX_WORDS[basis.index][row.trend]);
  return `${title}: ${what} ${movedBy(amount, unit, basis)} per decade (${interval}), ${where}.`;
}

/** What happened, as a verb with its amount. Example: "lost 6.2 % of its mean" */
function movedBy(amount: number, unit: string, { index }: ResolvedBasis): string {
  const size = `${plain(Math.abs(amount))}${unit}`;
  if (index === 'minimum-date') return `came ${size} ${amount < 0 ? 'earlier' : 'later'}`;
  return `${amount < 0 ? 'lost' : 'gained'} ${size}`;
}

function dryingVerdict(row: RankingRow): string {
  const days = row.zeroDaysPerDecade ?? Number.NaN;
  const change = `zero-flow days changed by ${signed(days)} a year per decade (${intervalWords(
    row.zeroDaysLow,
    row.zeroDaysHigh,
  )})`;
  const rest = `${evidence(row)}; ${row.zeroFlowYears} of ${row.yearsUsed} minima are zero, so it is not ranked by slope.`;
  if (row.trend === 'falling') return `Drying for longer: ${change}, ${rest}`;
  if (row.trend === 'rising') return `Drying for shorter: ${change}, ${rest}`;
  return `Often dry, without a significant trend: ${change}, ${rest}`;
}

/** In percent of the mean where there is one that means something, else in the index's own unit. */
function changeOf(
  row: RankingRow,
  { index }: ResolvedBasis,
): { amount: number; unit: string; low: number | null; high: number | null } {
  const { percentPerDecade, meanValue, valueSlope, valueSlopeLow, valueSlopeHigh } = row;
  if (percentPerDecade === null) {
    const { slopeUnit } = INDEX_FACTS[index];
    const unit = slopeUnit === '' ? '' : ` ${slopeUnit}`;
    return { amount: valueSlope ?? Number.NaN, unit, low: valueSlopeLow, high: valueSlopeHigh };
  }
  const percent = (slope: number | null) => percentOfMean(slope, index, meanValue);
  return {
    amount: percentPerDecade,
    unit: ' % of its mean',
    low: percent(valueSlopeLow),
    high: percent(valueSlopeHigh),
  };
}

const capitalised = (words: string): string => words[0].toUpperCase() + words.slice(1);

function evidence({ firstYear, lastYear, yearsUsed, pAdjusted }: RankingRow): string {
  return `${firstYear}–${lastYear}, ${yearsUsed} usable years, adjusted p ${probability(pAdjusted)}`;
}
