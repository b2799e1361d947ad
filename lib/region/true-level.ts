import type { Basis } from '../basis.ts';
import type { ChanceMethod } from './regional-types.ts';
import { SIMULATED, type SimulatedFigure } from './simulated-figures.ts';

/** Names what was simulated. Example: "permutation, ar1-regional" */
export const fieldLevelName = (method: ChanceMethod, correction: Basis['serialCorrection']): string =>
  `${method}, ${correction}`;

/** Share of regions without any trend in which more stations fall than chance allows at a nominal 5 %: the least and the
 *  most over lag-1 correlations of 0, 0.3 and 0.5, simulated (`npm run validate`); null where it has not been. */
export function trueLevelOf(
  method: ChanceMethod,
  correction: Basis['serialCorrection'],
  figures: readonly SimulatedFigure[] = SIMULATED.figures,
): [number, number] | null {
  const name = fieldLevelName(method, correction);
  const levels = figures.filter(({ claim, of }) => claim === 'field-level' && of === name).map(({ value }) => value);
  return levels.length === 0 ? null : [Math.min(...levels), Math.max(...levels)];
}
