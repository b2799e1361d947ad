import { certainty } from './certainty.ts';
import { changePoints } from './change-points.ts';
import { falseAlarms } from './false-alarms.ts';
import { fieldLevel } from './field-level.ts';
import type { Scenario } from './figure.ts';
import { regional } from './regional.ts';
import { slopes } from './slopes.ts';

/** All that is simulated, in the order of the table. */
export const SCENARIOS: readonly Scenario[] = [
  ...falseAlarms,
  ...slopes,
  ...changePoints,
  ...certainty,
  ...fieldLevel,
  ...regional,
];
