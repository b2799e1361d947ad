/** Runs once in a starting server, before its first request. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME === 'nodejs' && process.env.NEXT_PHASE !== 'phase-production-build') {
    const { recoverJobs } = await import('./lib/jobs/recover.ts');
    await recoverJobs();
    const { keepWorkersReady } = await import('./lib/jobs/pool.ts');
    keepWorkersReady();
    const { startPendingChecks } = await import('./lib/jobs/recover.ts');
    await startPendingChecks();
  }
}
