'use client';
import { PageError } from '@/app/components/page-error';

export default function EvidenceError({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return <PageError what="The evidence could not be laid out" error={error} reset={reset} />;
}
