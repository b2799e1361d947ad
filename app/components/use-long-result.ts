'use client';
import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import { type FollowedJob, useJob } from './import/use-job.ts';
import { type LongProgress, type Seen, sharePassed } from './long-progress.ts';
import { AnswerError, detailOf, send, wordsOf } from './use-answer.ts';

export interface LongResult<Value> {
  /** the last answer; while `pending` it may be that of the address before */
  value: Value | null;
  /** the address that `value` answers */
  valueOf: string | null;
  /** why there is no answer, in words */
  problem: string | null;
  pending: boolean;
  /** set while the server works on it as a job */
  progress: LongProgress | null;
  /** it has been asked to stop, and finishes what it has in hand */
  cancelling: boolean;
  /** the work was stopped, here or elsewhere, before it was done */
  cancelled: boolean;
  /** stops the server's work, where `progress` says that there is some */
  cancel(): void;
  /** asks anew after a problem or a cancel */
  retry(): void;
}

interface LongJob extends FollowedJob {
  progress: { share?: number } | null;
}

interface State<Value> extends Omit<LongResult<Value>, 'progress' | 'cancel' | 'retry'> {
  job: string | null;
}

const NOTHING = {
  ...{ value: null, valueOf: null, problem: null, pending: false, cancelling: false, cancelled: false },
  job: null,
};

/** An answer that may take the server a while: where it answers 202 with a job, the job is followed and the address asked
 *  again when it is done. The work goes on when the page is left; it is stopped when the same place asks for something
 *  else, which would have to wait for it.
 *  @param address  of the JSON; null: nothing is asked
 *  @param version  asks anew when it changes */
export function useLongResult<Value>(address: string | null, version = 0): LongResult<Value> {
  const [state, setState] = useState<State<Value>>({ ...NOTHING, pending: address !== null });
  const [tries, setTries] = useState(0);
  const request = useMemo(() => ({ address, version, tries }), [address, version, tries]);
  const working = useRef<{ address: string; job: string } | null>(null);

  useEffect(() => {
    const { address } = request;
    const left = working.current;
    if (left && left.address !== address) {
      working.current = null;
      stop(left.job);
    }
    if (address === null) {
      setState(NOTHING);
      return;
    }
    const gone = new AbortController();
    setState((now) => ({ ...now, problem: null, cancelling: false, cancelled: false, pending: true, job: null }));
    ask<Value>(address, gone.signal).then(
      (answer) => {
        if (gone.signal.aborted) return;
        if ('job' in answer) {
          working.current = { address, job: answer.job };
          setState((now) => ({ ...now, job: answer.job }));
        } else setState({ ...NOTHING, value: answer.value, valueOf: address });
      },
      (error: unknown) => {
        if (!gone.signal.aborted) setState({ ...NOTHING, problem: wordsOf(error) });
      },
    );
    return () => gone.abort();
  }, [request]);

  const retry = useCallback(() => setTries((now) => now + 1), []);
  const job = useJob<LongJob>(state.job, (over) => {
    working.current = null;
    if (over.state === 'done') retry();
    else if (over.state === 'cancelled') setState((now) => ({ ...kept(now, request.address), cancelled: true }));
    else setState({ ...NOTHING, problem: over.error ?? 'The work ended without an answer.' });
  });
  const cancel = useCallback(() => {
    if (state.job === null) return;
    setState((now) => ({ ...now, cancelling: true }));
    stop(state.job);
  }, [state.job]);
  const progress = useProgress(state.job, job);

  const { job: _job, ...shown } = state;
  return { ...shown, progress, cancel, retry };
}

/** What may still be shown when no new answer comes: one to the same question, never one to another. */
const kept = <Value>(now: State<Value>, address: string | null): State<Value> =>
  now.valueOf === address ? { ...NOTHING, value: now.value, valueOf: now.valueOf } : NOTHING;

/** Where the followed job stands, with the time that is left at the pace seen so far. */
function useProgress(id: string | null, job: LongJob | null): LongProgress | null {
  const [progress, setProgress] = useState<LongProgress | null>(null);
  const begun = useRef<(Seen & { id: string }) | null>(null);
  useEffect(() => {
    if (id === null) {
      setProgress(null);
      return;
    }
    const share = job?.id === id && job.state === 'running' ? (job.progress?.share ?? null) : null;
    if (share !== null && begun.current?.id !== id) begun.current = { id, share, at: performance.now() };
    const since = begun.current?.id === id ? begun.current : null;
    setProgress(sharePassed(since, share, performance.now()));
  }, [id, job]);
  return progress;
}

async function ask<Value>(address: string, signal: AbortSignal): Promise<{ value: Value } | { job: string }> {
  const response = await fetch(address, { signal });
  if (!response.ok) throw new AnswerError(await detailOf(response));
  const answer: unknown = await response.json();
  return response.status === 202 ? { job: (answer as { job: string }).job } : { value: answer as Value };
}

/** What is refused, because the job has just ended, its own state tells. */
function stop(job: string): void {
  void send('DELETE', `/api/jobs/${encodeURIComponent(job)}`).catch((error: unknown) => {
    if (!(error instanceof AnswerError)) throw error;
  });
}
