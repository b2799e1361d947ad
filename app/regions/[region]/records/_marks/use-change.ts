'use client';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { AnswerError } from '@/app/components/use-answer';

/** A change on its way to the server: whether it is under way, and what came of it.
 *  @param onChanged  called when it is made; the page's own figures are asked anew then too */
export function useChange(onChanged: () => void) {
  const router = useRouter();
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const make = async (change: () => Promise<unknown>): Promise<boolean> => {
    setBusy(true);
    setProblem(null);
    try {
      await change();
      onChanged();
      router.refresh();
      return true;
    } catch (error) {
      if (!(error instanceof AnswerError)) throw error;
      setProblem(error.message);
      return false;
    } finally {
      setBusy(false);
    }
  };
  return { busy, problem, make };
}
