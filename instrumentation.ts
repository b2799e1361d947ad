/** Runs once in a starting server, before its first request: clears up what a process that died has left. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== 'nodejs' || process.env.NEXT_PHASE === 'phase-production-build') return;
  const { recoverStore } = await import('./lib/store/recover.ts');
  const { DEAD_AFTER_MS } = await import('./lib/store/jobs.ts');
  await recoverStore();
  // A job that died a moment ago still looks alive; by then it does not.
  const later = setTimeout(() => void recoverStore().catch(report), DEAD_AFTER_MS + 1000);
  later.unref();
}

function report(error: unknown): void {
  process.stderr.write(`Clearing up after unfinished work failed: ${String(error)}\n`);
}
