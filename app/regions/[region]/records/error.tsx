'use client';
import { PageError } from '@/app/components/page-error';

export default function RecordsError({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return <PageError what="The records could not be shown" error={error} reset={reset} />;
}
