import { MONTHS, type ResolvedBasis } from '../basis.ts';
import { mostSeasonDays } from '../calendar/season.ts';
import { rankingFigure } from './ranking-figure.ts';
import type { Ranking, RankingRow } from './ranking-types.ts';
import { FEWEST_FOR_REGIONAL } from './serial-terms.ts';

/** What a reader must know of a ranking as a whole, in sentences. */
export function warningsOf(rows: readonly RankingRow[], basis: ResolvedBasis, counts: Ranking['counts']): string[] {
  const warnings: string[] = [];
  if (!counts.stations) return warnings;
  if (basis.period === null) warnings.push(periodWarning(basis));
  else if (basis.period[1] - basis.period[0] + 1 < basis.minYears) {
    const [first, last] = basis.period;
    const words = first === last ? `${first} has 1 year` : `${first}–${last} has ${last - first + 1} years`;
    warnings.push(
      `The period ${words}, fewer than the ${basis.minYears} usable ones asked for: no station can be ranked.`,
    );
  }
  const unfit = seasonWarning(basis);
  if (unfit !== null) warnings.push(unfit);
  if (!counts.ranked) warnings.push('No station is ranked; each row says why.');
  else if (basis.serialCorrection === 'ar1-regional' && counts.ranked < FEWEST_FOR_REGIONAL) {
    warnings.push(
      `Fewer than ${FEWEST_FOR_REGIONAL} stations are ranked (${counts.ranked}), so each is tested with its own serial correction instead of the regional one.`,
    );
  }
  const without = rows.filter((row) => row.rank !== null && rankingFigure(row, basis.rankBy) === null).length;
  if (without) warnings.push(`${stationsAre(without)} ranked without the ranking figure, after all that have it.`);
  return warnings;
}

/** That no window of the basis fits into its season; null when one does, or none is asked for. */
function seasonWarning({ season, days, index }: ResolvedBasis): string | null {
  if (season === null || (index !== 'minimum' && index !== 'minimum-date')) return null;
  const most = mostSeasonDays(season);
  if (days <= most) return null;
  const months = season.map((month) => MONTHS[month - 1]).join('–');
  return `No ${days}-day mean lies within ${months}, which has at most ${most} days: take a longer season or fewer days.`;
}

function periodWarning({ asked, minYears }: ResolvedBasis): string {
  if (asked.period === 'common') {
    return `There is no common period: the usable years of the region span fewer than ${minYears} years.`;
  }
  return 'Periods differ: each station is judged over its own years, and short records crowd both ends of such a ranking.';
}

const stationsAre = (n: number): string => (n === 1 ? '1 station is' : `${n} stations are`);
