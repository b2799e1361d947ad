import { MONTHS, type ResolvedBasis } from '../basis.ts';
import type { RankingRow } from './ranking-types.ts';
import { intervalWords, plain, probability, signed } from './sentence-figures.ts';

/** A station's trend in one sentence, with its figures and their uncertainty; why there is none, where there is none.
 *  Example: "Falling: the 7-day minimum lost 6.2 % of its mean per decade (95 % interval −9.1 to −2.8), 1985–2024,
 *  38 usable years, adjusted p 0.003." */
export function verdict(row: RankingRow, basis: ResolvedBasis): string {
  if (row.drying && row.trend !== null) return dryingVerdict(row);
  if (row.trend === null) return `Not ranked: ${row.unrankedReason ?? 'no trend could be computed'}.`;
  const { amount, unit, low, high } = changeOf(row);
  const what = `the ${minimumWords(basis)}`;
  const where = evidence(row);
  const interval = intervalWords(low, high);
  if (row.trend === 'none') {
    return `No significant trend: ${what} changed by ${signed(amount)} ${unit} per decade (${interval}), ${where}. This does not show that nothing changed.`;
  }
  const verb = row.trend === 'falling' ? 'lost' : 'gained';
  const title = row.trend === 'falling' ? 'Falling' : 'Rising';
  return `${title}: ${what} ${verb} ${plain(Math.abs(amount))} ${unit} per decade (${interval}), ${where}.`;
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

/** In percent of the mean where there is one, else in m³/s. */
function changeOf(row: RankingRow): { amount: number; unit: string; low: number | null; high: number | null } {
  const { percentPerDecade, meanMinimum, slopePerDecade, slopeLow, slopeHigh } = row;
  if (percentPerDecade === null || meanMinimum === null) {
    return { amount: slopePerDecade ?? Number.NaN, unit: 'm³/s', low: slopeLow, high: slopeHigh };
  }
  const percent = (slope: number | null) => (slope === null ? null : (100 * slope) / meanMinimum);
  return { amount: percentPerDecade, unit: '% of its mean', low: percent(slopeLow), high: percent(slopeHigh) };
}

function minimumWords({ days, season }: ResolvedBasis): string {
  const months = season ? `${MONTHS[season[0] - 1]}–${MONTHS[season[1] - 1]} ` : '';
  return `${months}${days}-day minimum`;
}

function evidence({ firstYear, lastYear, yearsUsed, pAdjusted }: RankingRow): string {
  return `${firstYear}–${lastYear}, ${yearsUsed} usable years, adjusted p ${probability(pAdjusted)}`;
}
