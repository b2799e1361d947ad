'use client';
import { PageError } from '@/app/components/page-error';

export default function MapError({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return <PageError what="Map and ranking could not be made" error={error} reset={reset} />;
}
