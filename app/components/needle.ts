/** What a station's mark says: the one place that turns a ranking row into a shape, used by map, table and legend. */
import type { AnnualIndexName } from '@/lib/basis';
import { INDEX_FACTS, isOfMinus } from '@/lib/region/index-facts';
import { INDEX_WORDS } from '@/lib/region/index-words';
import type { RankingRow, Trend } from '@/lib/region/ranking-types';

type NeedleKind = 'ranked' | 'drying' | 'unranked';
type NeedleSide = 'falling' | 'rising' | 'level';

export interface Needle {
  kind: NeedleKind;
  side: NeedleSide;
  /** filled when the trend is significant, open when it may be chance */
  significant: boolean;
  /** radians from level, clockwise: positive = down to the right = falling */
  angle: number;
  /** what part of the disc is filled, 0 to 1, where the filling says something other than significance */
  share?: number;
}

/** A fall of this many percent per decade tilts the needle by 45°; steeper ones approach the upright. */
export const PERCENT_AT_45_DEGREES = 10;
/** A change that prints as 0.0 is drawn level. */
const LEVEL_BELOW = 0.05;
/** Where days are compared, or stand under Drying: so many a decade tilt by 45°. */
export const DAYS_AT_45_DEGREES = 10;

export interface NeedleFacts {
  rank: number | null;
  drying: boolean;
  trend: Trend | null;
  percentPerDecade: number | null;
  tau: number | null;
  zeroDaysPerDecade: number | null;
  /** what the trend is of, minima when left out, and its slope per decade in its own unit and sign */
  trendOf?: RankingRow['trendOf'];
  valueSlope?: number | null;
}

/** The mark of a station. Percent is the measure of tilt whatever the ranking is by, or days where those are compared;
 *  where there is none (a mean of 0) Kendall's tau decides, its ±1 standing upright. What is drier tilts as a fall. */
export function needleOf(row: NeedleFacts): Needle {
  const significant = row.trend === 'falling' || row.trend === 'rising';
  if (row.drying) {
    // more days without flow is drier: it tilts the way a fall does
    const days = row.zeroDaysPerDecade ?? 0;
    return { kind: 'drying', side: sideOf(-days), significant, angle: tilt(-days / DAYS_AT_45_DEGREES) };
  }
  if (row.rank === null) return { kind: 'unranked', side: 'level', significant: false, angle: 0 };
  const change = changeOf(row);
  if (change !== null) {
    const side = sideOf(change.amount);
    const angle = side === 'level' ? 0 : tilt(change.amount / change.at45);
    return { kind: 'ranked', side, significant, angle };
  }
  const tau = row.tau ?? 0;
  return { kind: 'ranked', side: sideOf(tau), significant, angle: -Math.asin(Math.max(-1, Math.min(1, tau))) };
}

/** How far a ranked station's figures move, below 0 when drier, and how far is 45°. */
function changeOf(row: NeedleFacts): { amount: number; at45: number } | null {
  const turn = isOfMinus(row.trendOf ?? 'minima') ? -1 : 1;
  if (row.percentPerDecade !== null) return { amount: turn * row.percentPerDecade, at45: PERCENT_AT_45_DEGREES };
  if (!row.trendOf || row.trendOf === 'minima' || row.trendOf === 'zero-days') return null;
  if (INDEX_FACTS[row.trendOf].hasPercent || row.valueSlope == null) return null;
  return { amount: turn * row.valueSlope, at45: DAYS_AT_45_DEGREES };
}

/** A station's mark whose filling says a share, as a disc fills from the top clockwise. The drying have none: theirs stays
 *  open.
 *  @param share  0 to 1; null leaves the mark open too */
export function sharedNeedle(needle: Needle, share: number | null): Needle {
  return needle.kind === 'ranked' ? { ...needle, share: share ?? 0 } : { ...needle, significant: false };
}

/** The filled part of a disc about the origin, as an SVG path: from the top clockwise, to the nearest eighth, for no eye
 *  tells finer ones apart at the size of a mark. */
export function sectorPath(share: number, radius: number): string {
  const eighths = Math.round(Math.max(0, Math.min(1, share)) * 8);
  if (eighths === 0) return '';
  if (eighths === 8) return `M0-${radius}a${radius} ${radius} 0 1 1-.01 0Z`;
  const angle = (eighths / 4) * Math.PI;
  const [x, y] = [Math.sin(angle) * radius, -Math.cos(angle) * radius];
  return `M0 0V-${radius}A${radius} ${radius} 0 ${eighths > 4 ? 1 : 0} 1 ${x.toFixed(3)} ${y.toFixed(3)}Z`;
}

const sideOf = (change: number): NeedleSide =>
  Math.abs(change) < LEVEL_BELOW ? 'level' : change < 0 ? 'falling' : 'rising';

const tilt = (change: number): number => Math.atan(-change) + 0;

/** The mark in words, for readers who see no mark.
 *  @param index  what is compared */
export function needleWords({ kind, side, significant }: Needle, index: AnnualIndexName = 'minimum'): string {
  if (kind === 'unranked') return 'not ranked';
  const sure = significant ? 'significant' : 'may be chance';
  if (kind === 'drying') {
    const word = { falling: 'increasing', rising: 'decreasing', level: 'steady' }[side];
    return `days without flow ${word}, ${sure}`;
  }
  return `${side === 'level' ? side : INDEX_WORDS[index][side]}, ${sure}`;
}
