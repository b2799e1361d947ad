/** Where a long answer stands. */
export interface LongProgress {
  /** 0 to 1; null while it waits for its turn */
  share: number | null;
  /** null until enough of it is done to say */
  secondsLeft: number | null;
}

/** What was known when the following began. */
export interface Seen {
  share: number;
  /** milliseconds, of any clock */
  at: number;
}

/** Least share and time that must pass before a pace is taken from them. */
const LEAST_SHARE = 0.03;
const LEAST_MS = 800;

/** The time left at the pace seen since the following began; a job that was joined half-way is judged by what came after.
 *  @param now  milliseconds, of the clock of `since` */
export function sharePassed(since: Seen | null, share: number | null, now: number): LongProgress {
  if (since === null || share === null) return { share, secondsLeft: null };
  const [passed, took] = [share - since.share, now - since.at];
  if (passed < LEAST_SHARE || took < LEAST_MS) return { share, secondsLeft: null };
  return { share, secondsLeft: (((1 - share) / passed) * took) / 1000 };
}
