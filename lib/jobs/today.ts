const MS_PER_HOUR = 3_600_000;
const MS_PER_DAY = 24 * MS_PER_HOUR;
/** The first clock to strike midnight is 14 hours ahead of UTC. */
const EARLIEST_ZONE_HOURS = 14;

/** Day number of the latest date that any place on Earth has now: a day after it lies in the future everywhere. */
export function latestDayOnEarth(now = Date.now()): number {
  return Math.floor((now + EARLIEST_ZONE_HOURS * MS_PER_HOUR) / MS_PER_DAY);
}
