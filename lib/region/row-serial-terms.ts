import type { Basis } from '../basis.ts';
import { pairwiseSlopes } from '../statistics/sen-slope.ts';
import { ar1VarianceFactor, cutLag1 } from '../statistics/serial-correlation.ts';
import { testedSeries } from './index-facts.ts';
import type { RankingRow } from './ranking-types.ts';
import { serialTerms } from './serial-terms.ts';

/** How the serial correction of a station's whole period is carried over to a part of it. */
export interface RowSerialTerms {
  correction: Basis['serialCorrection'];
  /** lag-1 correlation of the whole period; NaN when the correction used none */
  r1: number;
  /** factor of the whole period */
  serialFactor: number;
}

/** The serial terms that the ranking's test of a station used. A station that was not tested, since it is not ranked, is
 *  looked at by itself: `ar1-regional` is `ar1` then. */
export function rowSerialTerms(
  row: Pick<RankingRow, 'code' | 'years' | 'values' | 'trendOf' | 'r1' | 'serialFactor'>,
  correction: Basis['serialCorrection'],
): RowSerialTerms {
  if (row.serialFactor !== null) return { correction, r1: row.r1 ?? Number.NaN, serialFactor: row.serialFactor };
  const series = testedSeries(row);
  const { slope } = pairwiseSlopes(series.years, series.values);
  const [{ r1, serialFactor }] = serialTerms([{ ...series, slope, label: row.code }], correction);
  return { correction, r1, serialFactor };
}

/** Factor of a part of `n` years: from the whole period's lag-1 correlation where there is one, else the whole period's. */
export function factorOfPart(n: number, { correction, r1, serialFactor }: RowSerialTerms): number {
  const byLag1 = correction === 'ar1' || correction === 'ar1-regional' || correction === 'pre-whitened';
  return byLag1 && !Number.isNaN(r1) ? ar1VarianceFactor(n, cutLag1(r1)) : serialFactor;
}
