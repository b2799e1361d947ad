/** A small part of `npm run validate`: enough to notice a method that has lost what it promises. */
import { describe, expect, test } from 'vitest';
import { CLAIM_WORDS } from '../../../lib/region/simulated-figures.ts';
import { figureOf, type Scenario } from '../../validate/figure.ts';
import { SCENARIOS } from '../../validate/scenarios.ts';

/** Cases of a small run, by claim. */
const FEW: Record<string, number> = {
  'false-alarms': 300,
  'false-discoveries': 40,
  'interval-cover': 12,
  'regional-kendall': 80,
  'span-cover': 3,
  'span-width': 3,
};

/** A region of forty counts as one case, and a chain of three standard errors is not broken by chance. */
const ERRORS = 3;

/** Only a few regions: their own spread is no good guide to the standard error. */
const LEAST_ERROR = 0.03;

const casesOf = ({ claim, of }: Scenario): number =>
  of === 'ar1-regional' && claim === 'false-alarms' ? 12 : FEW[claim];
const promised = SCENARIOS.filter(({ aim }) => aim !== undefined);

describe.each(
  promised.map((scenario) => [`${scenario.claim}, ${scenario.of}, ${scenario.setting}`, scenario] as const),
)('%s', (_, scenario) => {
  test('is what it is meant to be', { timeout: 60_000 }, () => {
    const { value, error, aim } = figureOf(scenario, casesOf(scenario));
    const slack = ERRORS * Math.max(error, LEAST_ERROR);
    const [low, high] = aim!;
    if (low !== null) expect(value).toBeGreaterThan(low - slack);
    if (high !== null) expect(value).toBeLessThan(high + slack);
  });
});

test('without its correction a test raises more false alarms than with it, and the scenarios would show it', () => {
  const alarmsOf = (of: string) =>
    figureOf(
      SCENARIOS.find((one) => one.claim === 'false-alarms' && one.of === of && one.setting === 'lag-1 0.5')!,
      300,
    ).value;
  expect(alarmsOf('none')).toBeGreaterThan(0.15);
  expect(alarmsOf('ar1')).toBeLessThan(0.15);
});

test('every claim has words, and no scenario stands there twice', () => {
  for (const { claim } of SCENARIOS) expect(CLAIM_WORDS).toHaveProperty(claim);
  const names = SCENARIOS.map(({ claim, of, setting }) => `${claim}, ${of}, ${setting}`);
  expect(new Set(names).size).toBe(names.length);
});
