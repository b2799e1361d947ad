import { expect, test } from 'vitest';
import { FLOW_UNITS, toM3s } from '../../../lib/series/flow-units.ts';

test('toM3s() agrees with the definitions of foot, litre and day (NIST SP 811, 2008)', () => {
  const expected = {
    'm3/s': 1,
    'L/s': 1e-3,
    'ft3/s': 0.3048 ** 3,
    'ML/d': 1e6 / 1000 / 86_400,
    'Mgal/d': (1e6 * 231 * 0.0254 ** 3) / 86_400,
    'acre-ft/d': (43_560 * 0.3048 ** 3) / 86_400,
    'mm/d': (12e6 * 1e-3) / 86_400,
  };
  for (const unit of FLOW_UNITS) expect(toM3s(unit, 12) / expected[unit], unit).toBeCloseTo(1, 14);
});
