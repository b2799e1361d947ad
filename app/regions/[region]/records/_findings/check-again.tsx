'use client';
import { useState } from 'react';
import { count } from '@/app/components/format';
import { type FollowedJob, useJob } from '@/app/components/import/use-job';
import { ErrorNote } from '@/app/components/notes';
import ui from '@/app/components/ui.module.css';
import { AnswerError, send } from '@/app/components/use-answer';
import styles from './findings.module.css';

interface CheckJob extends FollowedJob {
  progress: { done?: number; stations?: number; share?: number } | null;
  result: { stations?: number; findings?: number } | null;
}

/** Runs the checks on all records anew, as a job; the page may be left meanwhile. */
export function CheckAgain({ slug, onChanged }: { slug: string; onChanged(): void }) {
  const [id, setId] = useState<string | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const job = useJob<CheckJob>(id, (over) => {
    if (over.state === 'done') onChanged();
    else setProblem(over.error ?? 'The checks were stopped.');
  });
  const running = id !== null && job?.state !== 'done' && job?.state !== 'failed' && job?.state !== 'cancelled';
  const share = job?.progress?.share ?? 0;

  const start = async () => {
    setProblem(null);
    try {
      const started = await send<{ id: string }>('POST', `/api/regions/${encodeURIComponent(slug)}/checks`, {});
      setId(started?.id ?? null);
    } catch (error) {
      if (!(error instanceof AnswerError)) throw error;
      setProblem(error.message);
    }
  };

  return (
    <div className={styles.check}>
      <button type="button" className={ui.button} disabled={running} onClick={() => void start()}>
        Check again
      </button>
      <p role="status" className={styles.who}>
        {running && 'Checking the records…'}
        {!running &&
          job?.state === 'done' &&
          `Checked${job.result?.stations === undefined ? '' : ` ${count(job.result.stations, 'station')}`}: ${count(job.result?.findings ?? 0, 'finding')}.`}
      </p>
      {running && <progress value={share} max={1} aria-label="Share of the records that is checked" />}
      {problem && <ErrorNote>{problem}</ErrorNote>}
    </div>
  );
}
