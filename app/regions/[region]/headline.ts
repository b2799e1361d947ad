import { count, fixed, percent } from '@/app/components/format';
import type { MapRow } from './map-row.ts';

/** The answer in one line: how many ranked stations fall and rise, and how many of those may be chance.
 *  Example: "10 of 33 ranked stations fall and 2 rise, with at most 10 % false discoveries expected." */
export function headline(rows: MapRow[], alpha: number): string {
  const ranked = rows.filter((row) => row.rank !== null);
  const falling = ranked.filter((row) => row.trend === 'falling').length;
  const rising = ranked.filter((row) => row.trend === 'rising').length;
  if (ranked.length === 0) return 'No station can be ranked on these terms.';
  const chance = `with at most ${percent(alpha, alpha < 0.01 ? 1 : 0)} false discoveries expected`;
  const still = falling + rising === 0 ? ' No significant trend is not no change.' : '';
  if (ranked.length === 1) {
    const does = falling ? 'falls' : rising ? 'rises' : 'neither falls nor rises';
    return `The one ranked station ${does}, ${chance}.${still}`;
  }
  const of = `${fixed(ranked.length)} ranked stations`;
  if (falling + rising === 0) return `None of ${of} falls or rises, ${chance}.${still}`;
  const fall = `${falling === 0 ? 'None' : fixed(falling)} of ${of} ${falling <= 1 ? 'falls' : 'fall'}`;
  const rise = rising === 0 ? 'none rises' : `${fixed(rising)} ${rising === 1 ? 'rises' : 'rise'}`;
  return `${fall} and ${rise}, ${chance}.`;
}

/** What stands beside the ranking: "2 stations are listed as drying and 3 are not ranked." Empty when there is none. */
export function besideRanking(rows: MapRow[]): string {
  const drying = rows.filter((row) => row.drying).length;
  const unranked = rows.filter((row) => row.rank === null && !row.drying).length;
  const parts: string[] = [];
  if (drying) parts.push(`${count(drying, 'station')} ${drying === 1 ? 'is' : 'are'} listed as drying`);
  if (unranked) {
    parts.push(`${drying ? fixed(unranked) : count(unranked, 'station')} ${unranked === 1 ? 'is' : 'are'} not ranked`);
  }
  return parts.length ? `${parts.join(' and ')}.` : '';
}
