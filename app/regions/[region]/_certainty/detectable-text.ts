import { fixed, flowIn, MISSING, significant, UNIT_WORDS, type Units } from '@/app/components/format';
import type { AnnualIndexName } from '@/lib/basis';
import type { DetectableTrend } from '@/lib/region/certainty-types';
import { INDEX_FACTS } from '@/lib/region/index-facts';

export interface DetectableTerms {
  /** what is compared */
  index: AnnualIndexName;
  /** the station stands under Drying: its days without flow are tested */
  drying: boolean;
  units: Units;
}

/** The trend that a record would have shown in four cases of five, before "per decade": in percent of the mean where there
 *  is such, else in the unit of what is tested. Example: "±6.2 %", "±3.1 days"; a dash when it is not known. */
export function detectableText(trend: DetectableTrend | undefined, terms: DetectableTerms): string {
  if (!trend) return MISSING;
  if (trend.percentPerDecade !== null) return `±${twoFigures(Math.abs(trend.percentPerDecade))} %`;
  if (trend.perDecade === null) return MISSING;
  const amount = Math.abs(trend.perDecade);
  if (terms.drying) return `±${twoFigures(amount)} days`;
  const { isFlow, slopeUnit } = INDEX_FACTS[terms.index];
  if (isFlow) return `±${significant(flowIn(amount, terms.units), 2)} ${UNIT_WORDS[terms.units].flow}`;
  return `±${significant(amount, 2)} ${slopeUnit}`.trim();
}

/** Two figures, or all before the point: 0.62, 6.2, 62, 128. */
const twoFigures = (value: number): string => (value >= 100 ? fixed(value) : significant(value, 2));
