/** Where the days of a year lie, in CSS pixels: the hydrograph, and below it a lane for each flag, finding and mark. */
export interface DayLayout {
  first: number;
  days: number;
  /** left and right edge of the plot, its top and its floor */
  left: number;
  right: number;
  top: number;
  floor: number;
  /** upper edge of the first lane, and a lane's height */
  lanes: number;
  laneHeight: number;
  height: number;
}

const TOP = 10;
const PLOT = 240;
/** room for the names of months between plot and lanes */
const AXIS = 26;
const LANE = 18;
const RIGHT = 10;

export function layOutDays(width: number, first: number, days: number, lanes: number): DayLayout {
  const left = width < 560 ? 78 : 112;
  return {
    first,
    days,
    left,
    right: Math.max(left + 1, width - RIGHT),
    top: TOP,
    floor: TOP + PLOT,
    lanes: TOP + PLOT + AXIS,
    laneHeight: LANE,
    height: TOP + PLOT + AXIS + lanes * LANE + 4,
  };
}

/** Left edge of a day; of the day after the last it is the plot's right edge. */
export const dayX = ({ left, right, first, days }: DayLayout, day: number): number =>
  left + ((day - first) / days) * (right - left);

/** The day at x, the nearest one outside the plot. */
export function dayAt({ left, right, first, days }: DayLayout, x: number): number {
  const at = Math.floor(((x - left) / (right - left)) * days);
  return first + Math.min(days - 1, Math.max(0, at));
}
