import type { AnnualIndexName } from '../basis.ts';
import type { RankingRow } from './ranking-types.ts';

/** When zeros keep a station out: `a-third` of the annual figures or more say too little for a slope; `all` zero is no
 *  figure at all; `none` where 0 is a figure like others. */
export type ZeroRule = 'a-third' | 'all' | 'none';

/** What must be known of an annual index to test, rank and name it. */
export interface IndexFacts {
  /** of its values; empty for a number without unit */
  unit: string;
  /** of its slopes, before "per decade" */
  slopeUnit: string;
  /** m³/s: has a figure per unit of drainage area */
  isFlow: boolean;
  /** more of it is drier, so that minus the index is tested: falling always is drier */
  moreIsDrier: boolean;
  zeroRule: ZeroRule;
  /** false where a percentage of the mean means nothing, or swings with a mean near 0: days per decade stand in for it */
  hasPercent: boolean;
  /** computed from the daily flows by itself; the others come with the annual minima */
  fromRecord: boolean;
}

const FLOW: IndexFacts = {
  unit: 'm³/s',
  slopeUnit: 'm³/s',
  isFlow: true,
  moreIsDrier: false,
  zeroRule: 'a-third',
  hasPercent: true,
  fromRecord: false,
};
const NUMBER: IndexFacts = { ...FLOW, isFlow: false, zeroRule: 'none' };

export const INDEX_FACTS: Readonly<Record<AnnualIndexName, IndexFacts>> = {
  minimum: FLOW,
  q95: { ...FLOW, fromRecord: true },
  'mean-flow': FLOW,
  'zero-flow-days': {
    ...NUMBER,
    unit: 'days',
    slopeUnit: 'days',
    moreIsDrier: true,
    zeroRule: 'all',
    hasPercent: false,
  },
  bfi: { ...NUMBER, unit: '', slopeUnit: '', fromRecord: true },
  'minimum-date': { ...NUMBER, unit: 'day of the year', slopeUnit: 'days', hasPercent: false },
  deficit: { ...NUMBER, unit: 'm³', slopeUnit: 'm³', moreIsDrier: true, zeroRule: 'all', fromRecord: true },
};

/** Whether z, p, tau and trend of a row are of minus its values, so that falling is drier. */
export function isOfMinus(trendOf: RankingRow['trendOf']): boolean {
  if (trendOf === null || trendOf === 'minima') return false;
  return trendOf === 'zero-days' || INDEX_FACTS[trendOf].moreIsDrier;
}

/** An amount in percent of a row's mean; null where the mean is not above 0 (it would turn the sign), or where a
 *  percentage of the index means nothing. */
export function percentOfMean(amount: number | null, index: AnnualIndexName, meanValue: number | null): number | null {
  if (amount === null || meanValue === null || !(meanValue > 0) || !INDEX_FACTS[index].hasPercent) return null;
  return (100 * amount) / meanValue;
}

const LITRES_PER_M3 = 1000;
/** m³ over km² are a thousandth of a millimetre each. */
const MM_PER_M3_KM2 = 1e-3;

/** An amount per unit of drainage area: L/s/km² of flows, mm of volumes, both in m³ before; of what has no part in an area
 *  the amount itself. Null without an area above 0 where one is needed. */
export function perArea(amount: number | null, index: AnnualIndexName, areaKm2: number | null): number | null {
  const { isFlow, unit } = INDEX_FACTS[index];
  if (!isFlow && unit !== 'm³') return amount;
  if (amount === null || areaKm2 === null || !(areaKm2 > 0)) return null;
  return isFlow ? (amount * LITRES_PER_M3) / areaKm2 : (amount / areaKm2) * MM_PER_M3_KM2;
}

/** What a ranked or drying station was tested on: its annual figures, turned so that falling is drier. */
export function testedSeries({ years, values, trendOf }: Pick<RankingRow, 'years' | 'values' | 'trendOf'>): {
  years: number[];
  values: number[];
} {
  // 0 − x, for −0 is not 0 to those who compare with Object.is
  return { years, values: isOfMinus(trendOf) ? values.map((value) => 0 - value) : values };
}
