import { UNITS_OF } from '../series/quantities.ts';
import { IntakeError, type Mapping } from './types.ts';

/** Why a mapping's unit is none of its quantity's; null where it is, or where nobody knows it yet. */
export function unitOfQuantityProblem(file: string, { quantity = 'flow', unit }: Mapping): IntakeError | null {
  if (unit === null || UNITS_OF[quantity].includes(unit)) return null;
  return new IntakeError({
    ...{ file, value: unit, needs: 'unit' },
    message: `this is no unit of ${quantity}`,
    remedy: `Say one of ${UNITS_OF[quantity].join(', ')}`,
  });
}
