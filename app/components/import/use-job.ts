'use client';
import { useEffect, useRef, useState } from 'react';
import type { ImportOutcome, ImportProgress } from '@/lib/jobs/import-types';

export interface ImportJob {
  id: string;
  state: 'waiting' | 'running' | 'done' | 'failed' | 'cancelled';
  progress: ImportProgress | null;
  result: ImportOutcome | null;
  error: string | null;
}

const POLL_EVERY_MS = 1000;
/** Failures in a row after which the stream is given up and the job is asked for instead. */
const STREAM_FAILURES = 2;

export const isOver = (job: ImportJob): boolean => ['done', 'failed', 'cancelled'].includes(job.state);

export async function fetchJob(id: string): Promise<ImportJob> {
  const response = await fetch(`/api/jobs/${encodeURIComponent(id)}`, { cache: 'no-store' });
  if (!response.ok) throw new Error(`job ${id}: ${response.status}`);
  return (await response.json()) as ImportJob;
}

/** Follows a job by its event stream, and by asking once a second where streams do not get through.
 *  `onOver` is called once, when the job is done, has failed or was cancelled. */
export function useJob(id: string | null, onOver: (job: ImportJob) => void): ImportJob | null {
  const [job, setJob] = useState<ImportJob | null>(null);
  const over = useRef(onOver);
  over.current = onOver;
  useEffect(() => {
    if (id === null) {
      setJob(null);
      return;
    }
    let closed = false;
    let timer: ReturnType<typeof setTimeout> | undefined;
    let failures = 0;
    const stream = new EventSource(`/api/jobs/${encodeURIComponent(id)}/events`);
    const close = () => {
      closed = true;
      stream.close();
      clearTimeout(timer);
    };
    const take = (next: ImportJob) => {
      if (closed) return;
      setJob(next);
      if (!isOver(next)) return;
      close();
      over.current(next);
    };
    const poll = async () => {
      try {
        take(await fetchJob(id));
      } catch {
        // the server may be starting anew; the next question will tell
      }
      if (!closed) timer = setTimeout(poll, POLL_EVERY_MS);
    };
    const onEvent = (event: MessageEvent<string>) => {
      failures = 0;
      take(JSON.parse(event.data) as ImportJob);
    };
    stream.addEventListener('message', onEvent);
    stream.addEventListener('job', onEvent as EventListener);
    stream.onerror = () => {
      failures += 1;
      if (failures < STREAM_FAILURES && stream.readyState !== EventSource.CLOSED) return;
      stream.close();
      if (!closed && timer === undefined) void poll();
    };
    return close;
  }, [id]);
  return job;
}
