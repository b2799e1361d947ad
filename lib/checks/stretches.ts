/** A stretch of a record: indices of its first and last day, both included. */
export type Stretch = [from: number, to: number];

/** The stretches of consecutive days whose value is above `limit`, or with sign −1 below −`limit`. A missing day is in
 *  none. */
export function stretchesAbove(values: Float64Array, limit: number, sign: 1 | -1 = 1): Stretch[] {
  const found: Stretch[] = [];
  let from = -1;
  for (let day = 0; day < values.length; day++) {
    if (sign * values[day] > limit) {
      if (from < 0) from = day;
    } else if (from >= 0) {
      found.push([from, day - 1]);
      from = -1;
    }
  }
  if (from >= 0) found.push([from, values.length - 1]);
  return found;
}

/** The largest of the days of a stretch, or with sign −1 the smallest. */
export function extremeOf(values: Float64Array, [from, to]: Stretch, sign: 1 | -1 = 1): number {
  let extreme = values[from];
  for (let day = from + 1; day <= to; day++) if (sign * values[day] > sign * extreme) extreme = values[day];
  return extreme;
}
