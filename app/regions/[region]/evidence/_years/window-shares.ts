import type { YearWindow } from '@/app/components/start-end/window-grid';
import type { RegionStartEnd } from '@/lib/region/window-types';

/** The chart of the region as JSON carries it. */
export type WindowCounts = { [Part in keyof RegionStartEnd]: number[] };

/** What one window of years says of the region. */
export interface WindowShare {
  window: YearWindow;
  /** ranked stations with enough usable years in it */
  stations: number;
  /** of these, with a falling slope, and those that fall and rise beyond chance each by itself */
  negative: number;
  falling: number;
  rising: number;
}

/** @returns null outside the chart and where no station has the window */
export function windowShare(counts: WindowCounts, [start, end]: YearWindow): WindowShare | null {
  const { starts, ends, stations, negative, falling, rising } = counts;
  if (starts.length === 0 || ends.length === 0) return null;
  const [row, column] = [start - starts[0], end - ends[0]];
  if (row < 0 || row >= starts.length || column < 0 || column >= ends.length) return null;
  const at = row * ends.length + column;
  if (!(stations[at] > 0)) return null;
  return {
    window: [start, end],
    ...{ stations: stations[at], negative: negative[at], falling: falling[at], rising: rising[at] },
  };
}

/** All windows that some station has, by start and then by end. */
export function windowShares(counts: WindowCounts): WindowShare[] {
  return counts.starts.flatMap((start) =>
    counts.ends.flatMap((end) => {
      const share = windowShare(counts, [start, end]);
      return share ? [share] : [];
    }),
  );
}
