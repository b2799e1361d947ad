'use client';
import { PageError } from '@/app/components/page-error';

export default function PairError({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return <PageError what="The comparison could not be made" error={error} reset={reset} />;
}
