'use client';
import { useEffect, useState } from 'react';

export interface Answer<Value> {
  value: Value | null;
  /** why there is none: the server's own words, or that it could not be reached */
  problem: string | null;
  pending: boolean;
  /** the version that `value` is of */
  version: number;
}

const NOTHING = { value: null, problem: null, pending: false, version: 0 };

/** What the server answers at an address, asked anew when the address or `version` changes; the answer before stands until
 *  the next one is there.
 *  @param address  null: nothing is asked */
export function useAnswer<Value>(address: string | null, version = 0): Answer<Value> {
  const [answer, setAnswer] = useState<Answer<Value>>({ ...NOTHING, pending: address !== null });
  useEffect(() => {
    if (address === null) {
      setAnswer(NOTHING);
      return;
    }
    const gone = new AbortController();
    setAnswer((now) => ({ ...now, pending: true }));
    ask<Value>(address, gone.signal).then(
      (value) => setAnswer({ value, problem: null, pending: false, version }),
      (error: unknown) => {
        if (!gone.signal.aborted) setAnswer({ ...NOTHING, problem: wordsOf(error), version });
      },
    );
    return () => gone.abort();
  }, [address, version]);
  return answer;
}

/** What the server said instead of doing what it was asked, or that it could not be reached. */
export class AnswerError extends Error {
  override name = 'AnswerError';
}

/** Why a request failed, in the server's words where it gave any. */
export const wordsOf = (error: unknown): string =>
  error instanceof AnswerError ? error.message : 'The server could not be reached. Try again in a moment.';

async function ask<Value>(address: string, signal: AbortSignal): Promise<Value> {
  const response = await fetch(address, { signal });
  if (!response.ok) throw new AnswerError(await detailOf(response));
  return (await response.json()) as Value;
}

/** Sends a change as JSON and answers what the server answers; null when that is nothing.
 *  @throws AnswerError with the server's reason */
export async function send<Value>(method: 'POST' | 'DELETE', address: string, body?: unknown): Promise<Value | null> {
  const response = await fetch(address, {
    method,
    ...(body === undefined ? {} : { headers: { 'content-type': 'application/json' }, body: JSON.stringify(body) }),
  }).catch(() => null);
  if (!response) throw new AnswerError('The server could not be reached. Nothing was changed; try again.');
  if (!response.ok) throw new AnswerError(await detailOf(response));
  return response.status === 204 ? null : ((await response.json()) as Value);
}

/** The server's own reason in an answer that is none. */
export async function detailOf(response: Response): Promise<string> {
  const answer = (await response.json().catch(() => null)) as { detail?: string } | null;
  return answer?.detail ?? `The server answered ${response.status}.`;
}
