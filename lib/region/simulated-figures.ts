import type { Basis } from '../basis.ts';
import stored from './simulated-figures.json' with { type: 'json' };

/** One figure that `npm run validate` got by simulation: how often, or how much, in a setting where the truth is known. */
export interface SimulatedFigure {
  /** what was asked: 'false-alarms', … */
  claim: string;
  /** of which method */
  of: string;
  /** Example: "lag-1 0.3" */
  setting: string;
  /** a share, 0 to 1 */
  value: number;
  /** its standard error, from the number of simulated cases */
  error: number;
  cases: number;
  /** ends of what the figure is meant to be; null where there is none */
  aim: [number | null, number | null] | null;
}

export interface SimulatedFigures {
  methodsVersion: number;
  figures: SimulatedFigure[];
}

/** All of them, as last written. */
export const SIMULATED = stored as SimulatedFigures;

export const FALSE_ALARM_LAGS = [0, 0.3, 0.5] as const;

/** How often a correction finds a trend at a nominal 5 % in series of 40 years that have none, by true lag-1 correlation.
 *  Empty where it has not been simulated. */
export function falseAlarmsOf(
  correction: Basis['serialCorrection'],
  figures: readonly SimulatedFigure[] = SIMULATED.figures,
): { lag1: number; share: number }[] {
  return FALSE_ALARM_LAGS.flatMap((lag1) => {
    const found = figures.find(
      ({ claim, of, setting }) => claim === 'false-alarms' && of === correction && setting === `lag-1 ${lag1}`,
    );
    return found ? [{ lag1, share: found.value }] : [];
  });
}

/** What each claim asks, in words. */
export const CLAIM_WORDS: Readonly<Record<string, string>> = {
  'false-alarms': 'finds a trend where there is none, at a nominal 5 %',
  'false-discoveries': 'declares anything in a region without trend, at 10 %',
  'long-memory': 'finds a trend in long memory without trend, at a nominal 5 %',
  'interval-cover': '95 % interval holds the true slope',
  'slope-exactly-zero': 'slope of a trendless series is exactly 0',
  'steepest-by-length': 'of the five steepest places, without trend or shared weather, go to records of this length',
  'detectable-trend': 'a trend of the detectable size is found (80 % meant)',
  'change-point-alarms': 'change point where there is none, at a nominal 5 %',
  'suggested-break-tested': 'a test at the break that the series suggested, at a nominal 5 %',
  'span-cover': '90 % rank span holds the true place, mean over stations',
  'span-width': 'mean width of the rank span, share of all places',
  'field-level': 'more stations fall than chance allows, in a region without trend, at 5 %',
  'regional-kendall': 'finds a common trend in a region without trend, at a nominal 5 %',
};

/** A share as the tables print it: one decimal of a percent. */
export const sharePercent = (share: number): string => `${(share * 100).toFixed(1)} %`;

/** What a figure is meant to be, in words; empty where there is no aim. Example: "at most 7.5 %" */
export function aimWords({ aim }: Pick<SimulatedFigure, 'aim'>): string {
  if (aim === null) return '';
  const [low, high] = aim;
  if (low === null) return high === null ? '' : `at most ${sharePercent(high)}`;
  return high === null ? `at least ${sharePercent(low)}` : `${sharePercent(low)} to ${sharePercent(high)}`;
}
