import { count, fixed, percent, range } from '@/app/components/format';
import type { YearWindow } from '@/app/components/start-end/window-grid';
import { type WindowCounts, type WindowShare, windowShares } from './window-shares.ts';

export const yearsOf = ([start, end]: YearWindow): string => range(start, end);

/** What the chart says in one sentence: whether most stations go one way whatever the years, and between which shares the
 *  stations that fall beyond chance range. */
export function windowsSentence(counts: WindowCounts, alpha: string): string | null {
  const windows = windowShares(counts);
  if (windows.length === 0) return null;
  if (windows.every(({ stations }) => stations === 1)) return oneStation(windows, alpha);
  const fallMost = windows.filter(({ negative, stations }) => 2 * negative > stations).length;
  const riseMost = windows.filter(({ negative, stations }) => 2 * negative < stations).length;
  const [most, word] = fallMost >= riseMost ? [fallMost, 'falling'] : [riseMost, 'level or rising'];
  const of = `${fixed(windows.length)} windows of at least 15 years`;
  const opening =
    windows.length === 1
      ? `In the one window of at least 15 usable years, ${yearsOf(windows[0].window)}, ${most === 1 ? `most stations have a ${word} slope` : 'as many stations have a falling slope as not'}`
      : `In ${most === windows.length ? `all ${of}` : `${fixed(most)} of ${of}`} most stations have a ${word} slope`;
  const side = fallMost >= riseMost ? 'falling' : 'rising';
  const [least, largest] = ends(windows, side);
  if (windows.length === 1) {
    return `${opening}; ${percent(shareOf(least, side))} of them ${side === 'falling' ? 'fall' : 'rise'} at the ${alpha} level, each by itself.`;
  }
  return `${opening}; the share that ${side === 'falling' ? 'falls' : 'rises'} at the ${alpha} level, each station by itself, runs from ${percent(shareOf(least, side))} (${yearsOf(least.window)}) to ${percent(shareOf(largest, side))} (${yearsOf(largest.window)}).`;
}

/** The same where no window has more than one station: shares of it would say little. */
function oneStation(windows: readonly WindowShare[], alpha: string): string {
  const falling = windows.filter(({ negative }) => negative > 0).length;
  const found = (side: 'falling' | 'rising') => windows.filter((window) => window[side] > 0).length;
  const others = `${fixed(found('rising'))} of the others ${found('rising') === 1 ? 'rises' : 'rise'}`;
  return `Of ${count(windows.length, 'window')} of at least 15 usable years ${fixed(falling)} ${falling === 1 ? 'slopes' : 'slope'} down, ${fixed(found('falling'))} of them at the ${alpha} level; ${others} at it.`;
}

const shareOf = (share: WindowShare, side: 'falling' | 'rising'): number => share[side] / share.stations;

/** The windows with the smallest and the largest share; of equal ones the longest, then the latest. */
function ends(windows: readonly WindowShare[], side: 'falling' | 'rising'): [WindowShare, WindowShare] {
  const years = ({ window: [start, end] }: WindowShare) => end - start;
  const better = (a: WindowShare, b: WindowShare, sign: number) =>
    sign * (shareOf(a, side) - shareOf(b, side)) || years(b) - years(a) || b.window[1] - a.window[1];
  const sorted = (sign: number) => [...windows].sort((a, b) => better(a, b, sign))[0];
  return [sorted(1), sorted(-1)];
}

/** One window read out. Example: "1985–2024: 28 of 33 stations have a falling slope; 14 fall and 2 rise at the 10 % level" */
export function windowWords(share: WindowShare, alpha: string): string {
  const { stations, negative, falling, rising } = share;
  return `${fixed(negative)} of ${count(stations, 'station')} ${negative === 1 ? 'has' : 'have'} a falling slope; ${fixed(falling)} ${falling === 1 ? 'falls' : 'fall'} and ${fixed(rising)} ${rising === 1 ? 'rises' : 'rise'} at the ${alpha} level`;
}
