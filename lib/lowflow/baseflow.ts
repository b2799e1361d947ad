/** Blocks of so many days, of which the smallest flow is looked at. */
const BLOCK_DAYS = 5;
/** A block's minimum is a turning point when this share of it is below the minima of both its neighbours. */
const TURNING_FACTOR = 0.9;

/** Baseflow by smoothed minima: the minima of blocks of five days, those that are turning points joined by straight
 *  lines, cut to the flow where the line would lie above it. Blocks begin anew after every gap, and a rest of fewer
 *  than five days before it makes no block. A dry spell of several blocks holds no turning point, since no share of 0 is
 *  below 0: the line over it is cut to the flow, which is 0.
 *  @param flow  daily flows of consecutive days, NaN where missing; left unchanged
 *  @returns     unit of the flow; NaN on missing days, and outside the first and last turning point of each stretch
 *               without gaps
 *  Source: Institute of Hydrology 1980, Low Flow Studies; Gustard, Bullock & Dixon 1992, IH Report 108; WMO-No. 1029,
 *  2008, Manual on Low-flow Estimation and Prediction. */
export function smoothedMinimaBaseflow(flow: Float64Array): Float64Array {
  const base = new Float64Array(flow.length).fill(Number.NaN);
  let from = 0;
  while (from < flow.length) {
    if (Number.isNaN(flow[from])) {
      from += 1;
      continue;
    }
    let to = from;
    while (to < flow.length && !Number.isNaN(flow[to])) to += 1;
    joinTurningPoints(flow, turningPoints(flow, from, to), base);
    from = to;
  }
  return base;
}

/** Days of the turning points of a stretch without gaps, `to` exclusive: positions in `flow`, rising. */
export function turningPoints(flow: Float64Array, from = 0, to = flow.length): number[] {
  const days: number[] = [];
  for (let block = from; block + BLOCK_DAYS <= to; block += BLOCK_DAYS) {
    let lowest = block;
    for (let day = block + 1; day < block + BLOCK_DAYS; day += 1) if (flow[day] < flow[lowest]) lowest = day;
    days.push(lowest);
  }
  return days.filter((day, i) => {
    if (i === 0 || i === days.length - 1) return false;
    const lowered = TURNING_FACTOR * flow[day];
    return lowered < flow[days[i - 1]] && lowered < flow[days[i + 1]];
  });
}

function joinTurningPoints(flow: Float64Array, points: readonly number[], base: Float64Array): void {
  for (let i = 0; i < points.length; i += 1) {
    const day = points[i];
    base[day] = flow[day];
    if (i === 0) continue;
    const before = points[i - 1];
    const slope = (flow[day] - flow[before]) / (day - before);
    for (let between = before + 1; between < day; between += 1) {
      base[between] = Math.min(flow[between], flow[before] + slope * (between - before));
    }
  }
}
