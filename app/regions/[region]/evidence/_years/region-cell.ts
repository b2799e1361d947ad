import type { WindowCell } from '@/app/components/start-end/draw-windows';
import { type ToneSteps, toneOf } from '@/app/components/start-end/tone-steps';
import type { YearFigure } from '../evidence-state.ts';
import type { WindowShare } from './window-shares.ts';

/** Percent of stations with slopes to one side; half and half is level. */
const SIGN_STEPS: ToneSteps = [60, 70, 80, 90];
/** Percent of stations, falling less rising. */
const BALANCE_STEPS: ToneSteps = [5, 10, 20, 40];

export const regionSteps = (figure: YearFigure): ToneSteps => (figure === 'sign' ? SIGN_STEPS : BALANCE_STEPS);

/** A window of the region as the chart shows it: to the falling side where most slopes fall, or where more stations fall than
 *  rise beyond chance. */
export function regionCell({ stations, negative, falling, rising }: WindowShare, figure: YearFigure): WindowCell {
  const balance = figure === 'sign' ? stations - 2 * negative : rising - falling;
  const sign = Math.sign(balance);
  const onThatSide = figure === 'sign' ? Math.max(negative, stations - negative) : Math.abs(balance);
  const tone = sign * toneOf((100 * onThatSide) / stations, regionSteps(figure));
  return { sign, tone, marked: false };
}
