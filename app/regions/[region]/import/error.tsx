'use client';
import { PageError } from '@/app/components/page-error';

export default function ImportError({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return <PageError what="The import page could not be made" error={error} reset={reset} />;
}
