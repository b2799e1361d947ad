/** What a station's mark says: the one place that turns a ranking row into a shape, used by map, table and legend. */
import type { Trend } from '@/lib/region/ranking-types';

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
/** Under Drying: days without flow gained per decade that tilt by 45°. */
const ZERO_DAYS_AT_45_DEGREES = 10;

export interface NeedleFacts {
  rank: number | null;
  drying: boolean;
  trend: Trend | null;
  percentPerDecade: number | null;
  tau: number | null;
  zeroDaysPerDecade: number | null;
}

/** The mark of a station. Percent is the measure of tilt whatever the ranking is by; where there is none (a mean of 0)
 *  Kendall's tau decides, its ±1 standing upright. */
export function needleOf(row: NeedleFacts): Needle {
  const significant = row.trend === 'falling' || row.trend === 'rising';
  if (row.drying) {
    // more days without flow is drier: it tilts the way a fall does
    const days = row.zeroDaysPerDecade ?? 0;
    return { kind: 'drying', side: sideOf(-days), significant, angle: tilt(-days / ZERO_DAYS_AT_45_DEGREES) };
  }
  if (row.rank === null) return { kind: 'unranked', side: 'level', significant: false, angle: 0 };
  if (row.percentPerDecade !== null) {
    const side = sideOf(row.percentPerDecade);
    const angle = side === 'level' ? 0 : tilt(row.percentPerDecade / PERCENT_AT_45_DEGREES);
    return { kind: 'ranked', side, significant, angle };
  }
  const tau = row.tau ?? 0;
  return { kind: 'ranked', side: sideOf(tau), significant, angle: -Math.asin(Math.max(-1, Math.min(1, tau))) };
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

/** The mark in words, for readers who see no mark. */
export function needleWords({ kind, side, significant }: Needle): string {
  if (kind === 'unranked') return 'not ranked';
  const subject = kind === 'drying' ? 'days without flow ' : '';
  const word = kind === 'drying' ? { falling: 'increasing', rising: 'decreasing', level: 'steady' }[side] : side;
  return `${subject}${word}, ${significant ? 'significant' : 'may be chance'}`;
}
