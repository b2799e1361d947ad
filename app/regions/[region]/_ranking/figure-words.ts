import { interval, signed, significant, specificIn, UNIT_WORDS, type Units } from '@/app/components/format';
import type { AnnualIndexName, Basis } from '@/lib/basis';
import { INDEX_FACTS } from '@/lib/region/index-facts';
import { INDEX_WORDS } from '@/lib/region/index-words';
import type { MapRow } from '../map-row.ts';

/** Days, millimetres and numbers without unit are what changes of dates, of deficits and of baseflow indices come in. */
export type FigureKind = Basis['rankBy'] | 'zero-days' | 'days' | 'millimetres' | 'number';

/** What the ranked list is ordered by under a basis. */
export function figureKind({ rankBy, index }: Pick<Basis, 'rankBy' | 'index'>): FigureKind {
  if (rankBy === 'kendall-tau') return rankBy;
  const { hasPercent, isFlow } = INDEX_FACTS[index];
  if (!hasPercent) return 'days';
  if (rankBy === 'percent-per-decade' || isFlow) return rankBy;
  return index === 'deficit' ? 'millimetres' : 'number';
}

/** How the figure a list is ordered by is headed, written and spoken. */
export interface FigureWords {
  heading: string;
  /** the interval's heading; null where the figure has none */
  intervalHeading: string | null;
  shown: (value: number | null) => number | null;
  text: (value: number | null) => string;
  /** figure, unit and interval for people who hear the table */
  spoken: (row: MapRow) => string;
}

const same = (value: number | null) => value;
const plus = (value: number | null, written: string) => (value !== null && value > 0 ? `+${written}` : written);

/** The words of a kind of figure in the units shown. */
export function figureWords(kind: FigureKind, units: Units): FigureWords {
  switch (kind) {
    case 'percent-per-decade':
      return figure('% / decade', same, (value) => signed(value, 1), '% per decade');
    case 'specific-change': {
      const unit = UNIT_WORDS[units].specific;
      const convert = (value: number | null) => specificIn(value, units) ?? null;
      const text = (value: number | null) => plus(value, significant(convert(value)));
      return figure(`${unit} / decade`, convert, text, `${unit} per decade`);
    }
    case 'kendall-tau':
      return { ...figure('Kendall’s tau', same, (value) => signed(value, 2), ''), intervalHeading: null };
    case 'zero-days':
      return figure('dry days / decade', same, (value) => signed(value, 1), 'days without flow per decade');
    case 'days':
      return figure('days / decade', same, (value) => signed(value, 1), 'days per decade');
    case 'millimetres':
      return figure('mm / decade', same, (value) => plus(value, significant(value, 2)), 'mm per decade');
    case 'number':
      return figure('change / decade', same, (value) => signed(value, 3), 'per decade');
  }
}

function figure(heading: string, shown: FigureWords['shown'], text: FigureWords['text'], unit: string): FigureWords {
  return {
    heading,
    intervalHeading: '95 % interval',
    shown,
    text,
    spoken: ({ figure: { value, low, high } }) => {
      const ends = low === null || high === null ? '' : `, 95 % interval ${interval(shown(low), shown(high), 1)}`;
      return `${text(value)} ${unit}${ends}`;
    },
  };
}

/** Trend under the figure, beside its adjusted p: "falling, p 0.003" or "may be chance, p 0.31". */
export function trendWords(trend: NonNullable<MapRow['trend']>, index: AnnualIndexName): string {
  return trend === 'none' ? 'may be chance' : INDEX_WORDS[index].shortly[trend];
}

/** Round marks for a column's scale: 0 and the outermost round number on each side that fits. */
export function axisTicks({ low, high }: { low: number; high: number }): number[] {
  const round = (limit: number) => {
    if (limit === 0) return 0;
    const power = 10 ** Math.floor(Math.log10(Math.abs(limit)));
    const step = [5, 2, 1].find((factor) => factor * power <= Math.abs(limit)) ?? 1;
    return Math.sign(limit) * step * power;
  };
  // an end that is close to zero would be written over it
  const apart = (high - low) * 0.22;
  return [...new Set([round(low), 0, round(high)])].filter((tick) => tick === 0 || Math.abs(tick) >= apart);
}
