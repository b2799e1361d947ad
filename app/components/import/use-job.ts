'use client';
import { useEffect, useRef, useState } from 'react';
import type { ImportOutcome, ImportProgress } from '@/lib/jobs/import-types';

/** What every job tells of itself. */
export interface FollowedJob {
  id: string;
  state: 'waiting' | 'running' | 'done' | 'failed' | 'cancelled';
  error: string | null;
}

export interface ImportJob extends FollowedJob {
  progress: ImportProgress | null;
  /** with the region that the import made or came to */
  result: (ImportOutcome & { regionId?: number | null }) | null;
}

const POLL_EVERY_MS = 1000;
/** Failures in a row after which the stream is given up and the job is asked for instead. */
const STREAM_FAILURES = 2;

export const isOver = (job: FollowedJob): boolean => ['done', 'failed', 'cancelled'].includes(job.state);

export async function fetchJob<Job extends FollowedJob = ImportJob>(id: string): Promise<Job> {
  const response = await fetch(`/api/jobs/${encodeURIComponent(id)}`, { cache: 'no-store' });
  if (!response.ok) throw new Error(`job ${id}: ${response.status}`);
  return (await response.json()) as Job;
}

/** Follows a job by its event stream, and by asking once a second where streams do not get through.
 *  `onOver` is called once, when the job is done, has failed or was cancelled. */
export function useJob<Job extends FollowedJob = ImportJob>(id: string | null, onOver: (job: Job) => void): Job | null {
  const [job, setJob] = useState<Job | null>(null);
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
    const take = (next: Job) => {
      if (closed) return;
      setJob(next);
      if (!isOver(next)) return;
      close();
      over.current(next);
    };
    const poll = async () => {
      try {
        take(await fetchJob<Job>(id));
      } catch {
        // the server may be starting anew; the next question will tell
      }
      if (!closed) timer = setTimeout(poll, POLL_EVERY_MS);
    };
    const onEvent = (event: MessageEvent<string>) => {
      failures = 0;
      take(JSON.parse(event.data) as Job);
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
