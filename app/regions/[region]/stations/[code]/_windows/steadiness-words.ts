import { count, fixed, shareText } from '@/app/components/format';
import type { StartEndAnswer } from './start-end-answer.ts';

/** How many windows go the way of the whole period, with the caution that belongs to it.
 *  Example: "Steadiness 97 %: 430 of 443 windows of at least 15 usable years go the way of the whole period. …" */
export function steadinessWords({ steadiness, windows }: Pick<StartEndAnswer, 'steadiness' | 'windows'>): string {
  if (steadiness === null)
    return 'The whole period goes neither way, so there is nothing for other years to agree with.';
  const agree = Math.round(steadiness * windows);
  return `Steadiness ${shareText(steadiness)}: ${fixed(agree)} of ${count(windows, 'window')} of at least 15 usable years ${agree === 1 ? 'goes' : 'go'} the way of the whole period. Windows overlap, so they are not independent evidence.`;
}
