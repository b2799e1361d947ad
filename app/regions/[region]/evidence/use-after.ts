'use client';
import { useEffect, useState } from 'react';
import type { LongResult } from '@/app/components/use-long-result';

type Settled = Pick<LongResult<unknown>, 'value' | 'problem' | 'pending' | 'cancelled' | 'progress'>;

/** Whether there is an answer, or will be none, or the server works on it as a job, which leaves room for shorter work. */
const isSettled = ({ value, problem, pending, cancelled, progress }: Settled): boolean =>
  progress !== null || (!pending && (value !== null || problem !== null || cancelled));

/** Opens a gate once, when an answer has come, has failed, was cancelled or takes long, and leaves it open: what is asked behind it need
 *  not be asked again because the answer before it changes. */
export function useAfter(answer: Settled): boolean {
  const [open, setOpen] = useState(false);
  const settled = isSettled(answer);
  useEffect(() => {
    if (settled) setOpen(true);
  }, [settled]);
  return open;
}
