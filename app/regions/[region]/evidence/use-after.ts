'use client';
import { useEffect, useState } from 'react';
import type { LongResult } from '@/app/components/use-long-result';

type Settled = Pick<LongResult<unknown>, 'value' | 'problem' | 'pending' | 'cancelled'>;

/** Whether there is an answer, or will be none. */
const isSettled = ({ value, problem, pending, cancelled }: Settled): boolean =>
  !pending && (value !== null || problem !== null || cancelled);

/** Opens a gate once, when an answer has come, has failed or was cancelled, and leaves it open: what is asked behind it need
 *  not be asked again because the answer before it changes. */
export function useAfter(answer: Settled): boolean {
  const [open, setOpen] = useState(false);
  const settled = isSettled(answer);
  useEffect(() => {
    if (settled) setOpen(true);
  }, [settled]);
  return open;
}
