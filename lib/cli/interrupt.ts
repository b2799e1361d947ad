/** Runs work that a person or the system may break off (SIGINT, SIGTERM).
 *  @param cancel  called when they do; the work then ends by itself */
export async function untilInterrupted<T>(cancel: () => void, work: () => Promise<T>): Promise<T> {
  process.once('SIGINT', cancel);
  process.once('SIGTERM', cancel);
  try {
    return await work();
  } finally {
    process.off('SIGINT', cancel);
    process.off('SIGTERM', cancel);
  }
}
